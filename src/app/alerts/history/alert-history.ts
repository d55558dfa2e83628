import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import type { AlertKind } from '@shared/alerts/alert-rule';
import { countAlerts, listAlerts, type Alert } from '@shared/contracts/alerts';
import { formatMonth } from '@shared/format/room-time';
import { auditTime, finalize } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { LiveConnection } from '../../core/live-connection';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';

/** Which alerts are looked at; undefined for all. */
export interface HistoryFilter {
  readonly shelfId?: string | undefined;
  readonly kind?: AlertKind | undefined;
  /** `YYYY-MM` of the room's calendar. */
  readonly month?: string | undefined;
}

const pageSize = 30;
/** Counts needn't follow each alert of a power cut. */
const countAgainMs = 2_000;

/** Every alert of the room under a filter, a page at a time, the newest first, with counts. One for each page. */
@Injectable()
export class AlertHistory {
  private readonly api = inject(ApiClient);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  /** Null until the address is known; nothing is fetched before. */
  readonly filter = signal<HistoryFilter | null>(null);
  readonly isLoadingMore = signal(false);

  private readonly request = computed(() => {
    const [roomId, filter] = [this.session.roomId(), this.filter()];
    return roomId === null || filter === null ? undefined : { params: { roomId }, query: { ...filter } };
  });
  readonly resource = rxResource({
    params: this.request,
    stream: ({ params: { params, query } }) =>
      this.api.call(listAlerts, { params, query: { ...query, limit: pageSize } }),
  });
  readonly countResource = rxResource({
    params: this.request,
    stream: ({ params: request }) => this.api.call(countAlerts, request),
  });
  /** Null until the first page is there. */
  readonly alerts = computed(() => (this.resource.hasValue() ? this.resource.value().alerts : null));
  readonly hasMore = computed(() => this.resource.hasValue() && this.resource.value().nextCursor !== null);

  constructor() {
    const live = inject(LiveConnection);
    const changed = live.on('alert:changed');
    changed.pipe(takeUntilDestroyed()).subscribe((alert) => this.takeOver(alert));
    changed.pipe(auditTime(countAgainMs), takeUntilDestroyed()).subscribe(() => this.countResource.reload());
    live.caughtUp.pipe(takeUntilDestroyed()).subscribe(() => {
      this.resource.reload();
      this.countResource.reload();
    });
  }

  /** Fetches the next page. */
  showMore(): void {
    const request = this.request();
    const cursor = this.resource.hasValue() ? this.resource.value().nextCursor : null;
    if (request === undefined || cursor === null) return;
    this.isLoadingMore.set(true);
    this.api
      .call(listAlerts, { ...request, query: { ...request.query, limit: pageSize, cursor } })
      .pipe(finalize(() => this.isLoadingMore.set(false)))
      .subscribe({
        // Another filter may have been chosen meanwhile; then the page belongs to nothing that is shown.
        next: (page) => {
          if (request !== this.request()) return;
          this.resource.update((held) => ({ ...page, alerts: [...(held?.alerts ?? []), ...page.alerts] }));
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  /** Takes over an alert that changed; one that is new to the list comes first. */
  takeOver(alert: Alert): void {
    if (!this.passes(alert)) return;
    this.resource.update((held) => {
      if (held === undefined) return held;
      const isKnown = held.alerts.some(({ id }) => id === alert.id);
      const isNewest = alert.openedAt >= (held.alerts[0]?.openedAt ?? '');
      if (isKnown) return { ...held, alerts: held.alerts.map((one) => (one.id === alert.id ? alert : one)) };
      return isNewest ? { ...held, alerts: [alert, ...held.alerts] } : held;
    });
  }

  private passes(alert: Alert): boolean {
    const { shelfId, kind, month } = this.filter() ?? {};
    return (
      (shelfId ?? alert.shelfId) === alert.shelfId &&
      (kind ?? alert.kind) === alert.kind &&
      (month === undefined || month === formatMonth(alert.openedAt, this.session.timeZone()))
    );
  }
}
