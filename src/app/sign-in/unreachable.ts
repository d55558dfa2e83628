import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { finalize } from 'rxjs';
import { failureText } from '../core/failure-text';
import { returnPath } from '../core/return-path';
import { Session } from '../core/session';
import { ErrorState } from '../ui/states/error-state';

/** Stands at the address of any page while the server can't be asked who is signed in. */
@Component({
  selector: 'app-unreachable',
  template: `
    <h1 class="read-out-only" tabindex="-1">No answer from the server</h1>
    <app-error-state title="No answer from the server" [message]="message()" (retried)="tryAgain()" />
    @if (hasCare) {
      <p><a routerLink="/care">Today’s care is on this device</a>: what you tick goes out by itself later.</p>
    }
  `,
  styles: `
    :host {
      display: block;
      max-width: 560px;
      margin: 12dvh auto 0;
    }

    p {
      text-align: center;
    }

    a {
      color: var(--leek);
      font-weight: 600;
      line-height: var(--target);
    }
  `,
  imports: [ErrorState, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Unreachable {
  /** The page that was asked for, from the address. */
  readonly to = input<string>();

  private readonly session = inject(Session);
  private readonly router = inject(Router);
  private isAsking = false;
  protected readonly hasCare = this.session.isSomebodyKnown;
  protected readonly message = signal(
    'Your plants are measured all the same: devices keep their readings until the server is back. ' +
      'Check the network here, then try again.',
  );

  protected tryAgain(): void {
    if (this.isAsking) return;
    this.isAsking = true;
    this.session
      .load()
      .pipe(finalize(() => (this.isAsking = false)))
      .subscribe({
        next: () => void this.router.navigateByUrl(returnPath(this.to())),
        error: (error: unknown) => this.message.set(failureText(error)),
      });
  }
}
