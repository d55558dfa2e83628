import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { formatNumber } from '@shared/format/numbers';

/** Part of a day: minutes since the room's midnight, from (included) to (left out). */
export type DayMinutes = readonly [from: number, to: number];

/**
 * A room's day from midnight to midnight: planned lamp hours outlined, measured light filled, a tick for now, and
 * the sum of both in words.
 */
@Component({
  selector: 'app-lamp-day',
  templateUrl: './lamp-day.html',
  styleUrl: './lamp-day.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LampDay {
  readonly planned = input.required<readonly DayMinutes[]>();
  /** Hours in which light was measured; null without a light sensor. */
  readonly measured = input.required<readonly DayMinutes[] | null>();
  /** Minutes since midnight; null on a day that is not today. */
  readonly nowMinutes = input<number | null>(null);
  /** Length of this day: 1440, or 1380 or 1500 when the clocks change. */
  readonly dayMinutes = input(1440);

  protected readonly plannedBars = computed(() => this.planned().map((part) => this.bar(part)));
  protected readonly measuredBars = computed(() => (this.measured() ?? []).map((part) => this.bar(part)));
  protected readonly now = computed(() => {
    const now = this.nowMinutes();
    return now === null ? null : this.percent(now);
  });

  /** "8.3 of 16 h", as seen. */
  protected readonly words = computed(() => {
    const planned = minutesIn(this.planned());
    const parts = this.measured();
    if (parts === null) return planned === 0 ? 'no lamp hours' : `${hours(planned)} h planned`;
    const measured = minutesIn(parts);
    if (planned === 0) return measured === 0 ? 'no lamp hours' : `${hours(measured)} h, none planned`;
    return `${hours(measured)} of ${hours(planned)} h`;
  });

  private bar([from, to]: DayMinutes): { from: number; width: number } {
    const [start, end] = [this.percent(from), this.percent(to)];
    return { from: start, width: Math.max(0, end - start) };
  }

  private percent(minutes: number): number {
    return Math.min(100, Math.max(0, (minutes / this.dayMinutes()) * 100));
  }
}

function minutesIn(parts: readonly DayMinutes[]): number {
  return parts.reduce((sum, [from, to]) => sum + Math.max(0, to - from), 0);
}

function hours(minutes: number): string {
  return formatNumber(minutes / 60, minutes % 60 === 0 ? 0 : 1);
}
