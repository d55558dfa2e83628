import { Injectable, signal } from '@angular/core';
import type { FormGroup } from '@angular/forms';
import { finalize, type Observable } from 'rxjs';
import { showFieldProblems } from './field-problems';

/** Sends what a form says, once at a time. One for each form. */
@Injectable()
export class FormSaving {
  readonly isSaving = signal(false);
  /** What is to be said for the whole form; null while nothing is. */
  readonly problem = signal<string | null>(null);

  /**
   * Sends it. What the server finds wrong stands at the fields that it names, the rest is the form's problem.
   *
   * @param form - Its controls carry the names of the body's fields.
   * @param call - Sends it.
   * @param done - Told of what was kept.
   */
  send<T>(form: FormGroup, call: Observable<T>, done: (kept: T) => void): void {
    this.isSaving.set(true);
    this.problem.set(null);
    call.pipe(finalize(() => this.isSaving.set(false))).subscribe({
      next: done,
      error: (error: unknown) => this.problem.set(showFieldProblems(form, error)),
    });
  }
}
