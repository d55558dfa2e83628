import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Router } from '@angular/router';
import { AlertInbox } from '../core/alert-inbox';
import { RoomMembers } from '../core/room-members';
import { Session } from '../core/session';
import type { HistoryFilter } from './history/alert-history';
import { filterOf } from './history/history-filter';
import { HistoryList } from './history/history-list';
import { OpenAlerts } from './open-alerts';

/** The alerts of the room: those open now, or all of them with those that are over. */
@Component({
  selector: 'app-alerts-page',
  templateUrl: './alerts-page.html',
  styleUrl: './alerts-page.scss',
  imports: [HistoryList, OpenAlerts],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertsPage {
  /** From the address: "all" shows those that are over too. */
  readonly show = input<string>();
  /** From the address: what all of them are filtered by. */
  readonly shelf = input<string>();
  readonly kind = input<string>();
  readonly month = input<string>();

  private readonly inbox = inject(AlertInbox);
  private readonly router = inject(Router);

  protected readonly showsAll = computed(() => this.show() === 'all');
  protected readonly openCount = computed(() => this.inbox.open()?.length ?? 0);
  protected readonly filter = computed(() =>
    filterOf({ shelf: this.shelf(), kind: this.kind(), month: this.month() }),
  );

  constructor() {
    if (inject(Session).may('helper')) inject(RoomMembers).want();
  }

  protected showOpen(): void {
    void this.router.navigate([], { queryParams: {} });
  }

  protected showAll({ shelfId, kind, month }: HistoryFilter = {}): void {
    const queryParams = { show: 'all', shelf: shelfId ?? null, kind: kind ?? null, month: month ?? null };
    void this.router.navigate([], { queryParams });
  }
}
