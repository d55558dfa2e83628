import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { listAlerts, type Alert } from '@shared/contracts/alerts';
import { finalize } from 'rxjs';
import { ApiClient } from '../core/api-client';
import { LiveConnection } from '../core/live-connection';
import { Notices } from '../core/notices';
import { Session } from '../core/session';

const pageSize = 30;

/** Every alert of the room or of one shelf, a page at a time, the newest first. One for each page that lists them. */
@Injectable()
export class AlertHistory {
  private readonly api = inject(ApiClient);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  /** Only this shelf's; null for all of them. */
  readonly shelfId = signal<string | null>(null);
  /** Whether it is looked at; while it isn't, nothing is fetched. */
  readonly isShown = signal(false);
  readonly isLoadingMore = signal(false);

  private readonly request = computed(() => {
    const roomId = this.session.roomId();
    if (roomId === null || !this.isShown()) return undefined;
    return { params: { roomId }, query: { shelfId: this.shelfId() ?? undefined, limit: pageSize } };
  });
  readonly resource = rxResource({
    params: this.request,
    stream: ({ params: request }) => this.api.call(listAlerts, request),
  });
  /** Null until the first page is there. */
  readonly alerts = computed(() => (this.resource.hasValue() ? this.resource.value().alerts : null));
  readonly hasMore = computed(() => this.resource.hasValue() && this.resource.value().nextCursor !== null);

  constructor() {
    const live = inject(LiveConnection);
    live
      .on('alert:changed')
      .pipe(takeUntilDestroyed())
      .subscribe((alert) => this.takeOver(alert));
    live.caughtUp.pipe(takeUntilDestroyed()).subscribe(() => this.resource.reload());
  }

  /** Fetches the next page. */
  showMore(): void {
    const request = this.request();
    const cursor = this.resource.hasValue() ? this.resource.value().nextCursor : null;
    if (request === undefined || cursor === null) return;
    this.isLoadingMore.set(true);
    this.api
      .call(listAlerts, { ...request, query: { ...request.query, cursor } })
      .pipe(finalize(() => this.isLoadingMore.set(false)))
      .subscribe({
        next: (page) =>
          this.resource.update((held) => ({ ...page, alerts: [...(held?.alerts ?? []), ...page.alerts] })),
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  /** Takes over an alert that changed; one that is new to the list comes first. */
  takeOver(alert: Alert): void {
    const shelfId = this.shelfId();
    if (shelfId !== null && alert.shelfId !== shelfId) return;
    this.resource.update((held) => {
      if (held === undefined) return held;
      const isKnown = held.alerts.some(({ id }) => id === alert.id);
      const isNewest = alert.openedAt >= (held.alerts[0]?.openedAt ?? '');
      if (isKnown) return { ...held, alerts: held.alerts.map((one) => (one.id === alert.id ? alert : one)) };
      return isNewest ? { ...held, alerts: [alert, ...held.alerts] } : held;
    });
  }
}
