import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { Clipboard } from '@angular/cdk/clipboard';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { getCalendarFeed, removeCalendarFeed, renewCalendarFeed } from '@shared/contracts/care-feed';
import { filter, finalize, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { Asking } from '../../ui/dialogs/asking';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';

/** The person's care tasks in their own calendar: the secret link, made, shown once, renewed and ended. */
@Component({
  selector: 'app-account-calendar',
  templateUrl: './account-calendar.html',
  styleUrl: '../setting.scss',
  styles: `
    .actions {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
    }

    ol {
      margin: 0 0 12px;
      padding-left: 20px;
      color: var(--ink-2);
    }

    summary {
      min-height: var(--target);
      align-content: center;
      font-weight: 600;
      cursor: pointer;
    }
  `,
  imports: [ErrorState, LoadingLines, MatButton, MatFormFieldModule, MatInput],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountCalendar {
  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly clipboard = inject(Clipboard);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);

  /** The link, while it is known: the server tells it once. */
  protected readonly url = signal<string | null>(null);
  protected readonly isBusy = signal(false);
  protected readonly resource = rxResource({ stream: () => this.api.call(getCalendarFeed) });
  protected readonly feed = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  protected readonly since = computed(() => {
    const madeAt = this.feed()?.madeAt ?? null;
    return madeAt === null ? null : this.format.when(madeAt);
  });
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  protected make(): void {
    if (this.isBusy()) return;
    this.isBusy.set(true);
    this.api
      .call(renewCalendarFeed)
      .pipe(finalize(() => this.isBusy.set(false)))
      .subscribe({
        next: ({ url, madeAt }) => {
          this.url.set(url);
          this.resource.set({ madeAt });
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  protected renew(): void {
    this.asking
      .ask({
        title: 'Give the feed a new link?',
        text: 'The old link ends at once. Calendars that follow it need the new one.',
        confirm: 'Renew the link',
        isDestructive: true,
      })
      .pipe(filter(Boolean))
      .subscribe(() => this.make());
  }

  protected end(): void {
    this.asking
      .ask({
        title: 'End the feed?',
        text: 'Its link leads nowhere from then on. Your tasks stay as they are.',
        confirm: 'End the feed',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() => this.api.call(removeCalendarFeed)),
      )
      .subscribe({
        next: () => {
          this.url.set(null);
          this.resource.set({ madeAt: null });
          this.notices.say('The feed has ended');
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  protected copy(url: string): void {
    this.notices.say(
      this.clipboard.copy(url)
        ? 'Link copied'
        : 'The link could not be copied; select it and copy it yourself.',
    );
  }
}
