import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { Router } from '@angular/router';
import { finalize } from 'rxjs';
import { viewOf } from '../core/account-theme';
import { asApiFailure } from '../core/api-failure';
import { failureText } from '../core/failure-text';
import { returnPath } from '../core/return-path';
import { Session } from '../core/session';
import { ProblemText } from '../ui/states/problem-text';
import { ThemeChoice } from '../ui/theme/theme-choice';

/** Where a person says who they are, on the way to the page they asked for. */
@Component({
  selector: 'app-sign-in',
  templateUrl: './sign-in.html',
  styleUrl: './sign-in.scss',
  imports: [
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatIconButton,
    MatInput,
    ProblemText,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignIn {
  /** The page to go on to, from the address. */
  readonly to = input<string>();
  /** Whether the server has just ended a session, from the address. */
  readonly ended = input<string>();

  private readonly session = inject(Session);
  private readonly router = inject(Router);
  private readonly theme = inject(ThemeChoice);

  protected readonly form = new FormGroup({
    email: new FormControl('', { nonNullable: true, validators: [Validators.required, Validators.email] }),
    password: new FormControl('', { nonNullable: true, validators: [Validators.required] }),
  });
  protected readonly isPasswordShown = signal(false);
  protected readonly isSending = signal(false);
  protected readonly problem = signal<string | null>(null);

  protected togglePassword(): void {
    this.isPasswordShown.update((isShown) => !isShown);
  }

  protected signIn(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isSending()) return;
    const { email, password } = this.form.getRawValue();
    this.isSending.set(true);
    this.problem.set(null);
    this.session
      .signIn(email, password)
      .pipe(finalize(() => this.isSending.set(false)))
      .subscribe({
        next: (account) => {
          this.theme.choose(viewOf(account.theme));
          void this.router.navigateByUrl(returnPath(this.to()));
        },
        error: (error: unknown) => this.problem.set(refusalText(error)),
      });
  }
}

function refusalText(error: unknown): string {
  return asApiFailure(error).kind === 'signedOut'
    ? 'That e-mail address and password don’t belong together. Check both and try again.'
    : failureText(error);
}
