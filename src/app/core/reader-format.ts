import { computed, inject, Injectable } from '@angular/core';
import type { EpisodeDescription } from '@shared/alerts/describe-episode';
import type { Quantity } from '@shared/climate/quantity';
import type { Alert } from '@shared/contracts/alerts';
import type { LampDay } from '@shared/contracts/board';
import { episodeFormatters } from '@shared/format/episode-formatters';
import { formatQuantity } from '@shared/format/quantities';
import { formatDayAndYear, formatTime, sayWhen, type Instant } from '@shared/format/room-time';
import { dayBounds } from '@shared/series/room-days';
import { describeAlert } from './describe-alert';
import { RoomClock } from './room-clock';
import { Session } from './session';
import { wasLit } from './was-lit';

/** Says values, instants and alerts in the reader's unit and the room's time zone. Templates follow its signals. */
@Injectable({ providedIn: 'root' })
export class ReaderFormat {
  private readonly session = inject(Session);
  private readonly clock = inject(RoomClock);
  private readonly episodes = computed(() =>
    episodeFormatters(this.session.temperatureUnit(), this.session.timeZone(), this.clock.calmNow()),
  );

  /** The room's day now, `YYYY-MM-DD`. */
  readonly today = computed(() => dayBounds(this.clock.calmNow(), this.session.timeZone()).date);

  /** A day of the calendar, `YYYY-MM-DD`, as a person writes it: "1 Dec 2026"; "today" for the room's own. */
  day(day: string): string {
    return day === this.today() ? 'today' : formatDayAndYear(`${day}T00:00:00Z`, 'UTC');
  }

  /** A stored value with its unit: "28.3 °C"; a dash for null. */
  value(quantity: Quantity, value: number | null): string {
    return formatQuantity(quantity, value, this.session.temperatureUnit());
  }

  /** The time of day in the room: "14:20". */
  time(at: Instant): string {
    return formatTime(at, this.session.timeZone());
  }

  /** When something was, as a person says it today: "14:20", "yesterday 14:20". */
  when(at: Instant): string {
    return sayWhen(at, this.clock.calmNow(), this.session.timeZone());
  }

  /**
   * An alert in words.
   *
   * @param lampDay - The light of its shelf today, where it is known: lamps that were off are not to blame.
   */
  describe(alert: Alert, lampDay: LampDay | null = null): EpisodeDescription {
    const now = this.clock.calmNow();
    const isLit = lampDay && wasLit(lampDay, alert.peakAt, dayBounds(now, this.session.timeZone()).start);
    return describeAlert(alert, this.episodes(), now, isLit);
  }
}
