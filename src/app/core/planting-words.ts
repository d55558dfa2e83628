import type { PlantingSummary } from '@shared/contracts/board';
import { formatShortDay } from '@shared/format/room-time';

const dayMs = 24 * 3600_000;
const daysOfYear = 365;

/** A day's number on one long calendar; days have no clock, so none changes. */
function dayNumber(day: string): number {
  return Date.parse(`${day}T00:00:00Z`) / dayMs;
}

function dayWords(day: string, today: string): string {
  if (day === today) return 'today';
  return formatShortDay(`${day}T00:00:00Z`, 'UTC').replace(/^\w+ /, '');
}

/**
 * Age or stage of a planting, as it stands on its label: "sown 21 Nov", "day 274", "year 4".
 *
 * @param today - The room's day, `YYYY-MM-DD`.
 */
export function plantingWords({ stage, startedOn, stageSince }: PlantingSummary, today: string): string {
  switch (stage) {
    case 'sown':
      return `sown ${dayWords(startedOn, today)}`;
    case 'emerging':
      return `first up ${dayWords(stageSince, today)}`;
    case 'resting':
      return `resting since ${dayWords(stageSince, today)}`;
    case 'out':
    case 'ended':
      return `out since ${dayWords(stageSince, today)}`;
    default: {
      const days = dayNumber(today) - dayNumber(startedOn);
      return days < daysOfYear ? `day ${days}` : `year ${Math.floor(days / daysOfYear) + 1}`;
    }
  }
}

/**
 * How large a planting is drawn: young plants smaller, grown after four months.
 *
 * @returns 0.55 to 1, against a grown plant. A drawing, not a measurement.
 */
export function plantingSize({ startedOn }: PlantingSummary, today: string): number {
  const share = Math.min(1, Math.max(0, dayNumber(today) - dayNumber(startedOn)) / 120);
  return 0.55 + 0.45 * share;
}
