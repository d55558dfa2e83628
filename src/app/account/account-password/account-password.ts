import { ChangeDetectionStrategy, Component, inject, input, signal, viewChild } from '@angular/core';
import { FormControl, FormGroup, FormGroupDirective, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { changePassword } from '@shared/contracts/people';
import { finalize } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { asApiFailure } from '../../core/api-failure';
import { failureText } from '../../core/failure-text';
import { Notices } from '../../core/notices';
import { ProblemText } from '../../ui/states/problem-text';

const shortest = 12;
const longest = 200;

/** Changes the password; other devices are signed out by it. */
@Component({
  selector: 'app-account-password',
  templateUrl: './account-password.html',
  styleUrl: '../setting.scss',
  imports: [MatButton, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountPassword {
  /** For password managers, which keep a password by it. */
  readonly email = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly notices = inject(Notices);
  private readonly sent = viewChild.required(FormGroupDirective);

  protected readonly shortest = shortest;
  protected readonly form = new FormGroup({
    currentPassword: new FormControl('', { nonNullable: true, validators: [Validators.required] }),
    newPassword: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.minLength(shortest), Validators.maxLength(longest)],
    }),
  });
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  protected save(): void {
    if (this.form.invalid || this.isSaving()) return;
    this.isSaving.set(true);
    this.problem.set(null);
    this.api
      .call(changePassword, { body: this.form.getRawValue() })
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: () => {
          // Resets what Material counts as sent too, or the emptied fields would show errors.
          this.sent().resetForm();
          this.notices.say('Password changed; other devices are signed out');
        },
        error: (error: unknown) => this.problem.set(refusalText(error)),
      });
  }
}

function refusalText(error: unknown): string {
  const failure = asApiFailure(error);
  const current = failure.fieldError('currentPassword');
  if (current !== null) return `The current password ${current}.`;
  const next = failure.fieldError('newPassword');
  return next === null ? failureText(failure) : `The new password ${next}.`;
}
