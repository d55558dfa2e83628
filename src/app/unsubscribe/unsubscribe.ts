import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { followMailLink, getMailLink, type MailLink } from '@shared/contracts/mail';
import type { MailStop } from '@shared/mail/mail-stop';
import { catchError, of, switchMap } from 'rxjs';
import { ApiClient } from '../core/api-client';
import { Notices } from '../core/notices';
import { Session } from '../core/session';

const kinds: Readonly<Record<MailStop, string>> = {
  lookToday: 'mails about alerts that can wait a day',
  alerts: 'mails about alerts, urgent ones too',
  cleared: 'mails that something is over',
  letter: 'the morning letter',
  care: 'mails about care',
};

/** Where the link of a mail leads: asks, and stops that kind of mail without signing in. */
@Component({
  selector: 'app-unsubscribe',
  template: `
    <h1 tabindex="-1">Stop these mails</h1>
    @if (link(); as link) {
      @if (link.isStopped) {
        <p role="status">
          <strong>{{ link.roomName }}</strong> no longer sends you {{ kind(link) }}.
        </p>
        <p>You can turn them on again in <a routerLink="/account">your account</a>.</p>
      } @else {
        <p>
          Shall <strong>{{ link.roomName }}</strong> stop sending you {{ kind(link) }}?
        </p>
        <button matButton="filled" type="button" [disabled]="isBusy()" (click)="stop()">Stop them</button>
        <p class="other">Other mails stay as you chose them in <a routerLink="/account">your account</a>.</p>
      }
    } @else if (stored.error()) {
      <p role="alert">
        This link is not one of ours any more, so nothing was changed. Choose your mails in
        <a routerLink="/account">your account</a>.
      </p>
    } @else {
      <p>Looking up the link…</p>
    }
  `,
  styles: `
    :host {
      display: block;
      max-width: 560px;
      padding: 24px 16px;
    }

    button {
      min-height: var(--target);
    }

    .other {
      margin-top: 18px;
      color: var(--ink-2);
    }
  `,
  imports: [MatButton, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Unsubscribe {
  /** From the path. */
  readonly token = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly notices = inject(Notices);

  protected readonly stored = rxResource({
    params: () => this.token(),
    stream: ({ params: token }) => this.api.call(getMailLink, { params: { token } }),
  });
  private readonly followed = signal<MailLink | null>(null);
  protected readonly isBusy = signal(false);
  protected readonly link = computed(
    () => this.followed() ?? (this.stored.hasValue() ? this.stored.value() : null),
  );

  protected kind({ stops }: MailLink): string {
    return kinds[stops];
  }

  protected stop(): void {
    this.isBusy.set(true);
    // Who happens to be signed in here must prove that the write comes from this page, as with every other.
    this.session
      .load()
      .pipe(
        catchError(() => of(null)),
        switchMap(() => this.api.call(followMailLink, { params: { token: this.token() }, body: undefined })),
      )
      .subscribe({
        next: (link) => this.followed.set(link),
        error: (error: unknown) => {
          this.isBusy.set(false);
          this.notices.sayFailure(error);
        },
      });
  }
}
