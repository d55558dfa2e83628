import { computed, inject, Injectable, signal } from '@angular/core';
import type { Alert } from '@shared/contracts/alerts';
import { isQuiet } from './alert-words';
import { RoomClock } from './room-clock';

/**
 * The open alerts of the room, for the badge in the navigation and whoever lists them. It only holds them; the feed
 * fills it, so that the frame needn't load the live connection to count.
 */
@Injectable({ providedIn: 'root' })
export class AlertInbox {
  private readonly clock = inject(RoomClock);
  private readonly held = signal<readonly Alert[] | null>(null);

  /** Open alerts, the newest first; null until they have been fetched. */
  readonly open = this.held.asReadonly();
  /** How many of them need a look: nobody has acknowledged them or let them be quiet for now. */
  readonly unseenCount = computed(
    () =>
      (this.held() ?? []).filter(
        (alert) => alert.acknowledgedAt === null && !isQuiet(alert, this.clock.calmNow()),
      ).length,
  );

  /** Holds what was fetched; null forgets another room's. */
  hold(alerts: readonly Alert[] | null): void {
    this.held.set(alerts);
  }

  /** Takes over an alert that opened, got worse, was acknowledged or cleared. */
  takeOver(alert: Alert): void {
    this.held.update((alerts) => {
      if (alerts === null) return null;
      const others = alerts.filter(({ id }) => id !== alert.id);
      if (alert.clearedAt !== null) return others;
      const isKnown = others.length < alerts.length;
      return isKnown ? alerts.map((one) => (one.id === alert.id ? alert : one)) : [alert, ...alerts];
    });
  }
}
