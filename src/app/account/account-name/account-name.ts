import { ChangeDetectionStrategy, Component, effect, inject, input, signal } from '@angular/core';
import { FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { finalize } from 'rxjs';
import { failureText } from '../../core/failure-text';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';

/** The name that others in the room see. */
@Component({
  selector: 'app-account-name',
  template: `
    <h2>Name</h2>
    <form (submit)="$event.preventDefault(); save()" novalidate>
      <mat-form-field appearance="outline" subscriptSizing="dynamic" hideRequiredMarker>
        <mat-label>Your name, as others in the room see it</mat-label>
        <input matInput autocomplete="name" maxlength="80" [formControl]="field" />
        <mat-error>Enter a name of up to 80 characters.</mat-error>
      </mat-form-field>
      <app-problem-text [message]="problem()" />
      <button matButton="filled" type="submit" [disabled]="isSaving()">Save the name</button>
    </form>
  `,
  styleUrl: '../setting.scss',
  imports: [MatButton, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountName {
  readonly name = input.required<string>();

  private readonly session = inject(Session);
  private readonly notices = inject(Notices);
  protected readonly field = new FormControl('', {
    nonNullable: true,
    validators: [Validators.required, Validators.pattern(/\S/)],
  });
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  constructor() {
    effect(() => this.field.reset(this.name()));
  }

  protected save(): void {
    this.field.markAsTouched();
    if (this.field.invalid) return;
    this.isSaving.set(true);
    this.problem.set(null);
    this.session
      .change({ name: this.field.value.trim() })
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: () => this.notices.say('Name saved'),
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }
}
