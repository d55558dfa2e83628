import { DateTime, IANAZone } from 'luxon';

import type { LampInterval } from '../alerts/lamp-plan';

/** The daily lamp hours of a shelf from an instant on, until its next plan. */
export interface LampHoursPlan {
  /** [ms since 1970 UTC] */
  readonly validFrom: number;
  /** `HH:MM` on the room's clock; null with `switchesOff` for a shelf that stays dark. */
  readonly switchesOn: string | null;
  /** `HH:MM`; before `switchesOn` runs past midnight, equal times are lit all day. */
  readonly switchesOff: string | null;
}

const MINUTE_MS = 60_000;
const DAY_MS = 86_400_000;
const WEEK_MS = 7 * DAY_MS;

/** A span of time, half-open. */
interface Span {
  readonly from: number;
  readonly to: number;
}

/**
 * The stretches of light that a shelf's plans make.
 *
 * @param plans - Every plan of the shelf that may touch the span, by the instant from which it holds. Before the first
 *   one nothing is planned.
 * @param zone - IANA time zone of the room, which the plans' clock times are in.
 * @param span - Half-open span [ms since 1970 UTC] to which the stretches are cut.
 * @returns Stretches in order; those that touch are one.
 *
 * @remarks
 * A lamp's timer follows the room's clock through both changes of the year: a time that the clock skips comes as much
 * later as was skipped, of a time that comes twice the first counts (RFC 5545 §3.3.5 reads local times the same way).
 */
export function plannedLight(plans: readonly LampHoursPlan[], zone: string, span: Span): LampInterval[] {
  const stretches = plans.flatMap((plan, index) => {
    const inForce = {
      from: Math.max(span.from, plan.validFrom),
      to: Math.min(span.to, plans[index + 1]?.validFrom ?? Infinity),
    };
    return inForce.from < inForce.to ? lightUnder(plan, zone, inForce) : [];
  });
  return joined(stretches);
}

function lightUnder({ switchesOn, switchesOff }: LampHoursPlan, zone: string, span: Span): LampInterval[] {
  if (switchesOn === null || switchesOff === null) return [];
  if (switchesOn === switchesOff) return [{ onAt: span.from, offAt: span.to }];
  const onMs = ofDayMs(switchesOn);
  const offMs = ofDayMs(switchesOff) + (switchesOff < switchesOn ? DAY_MS : 0);
  const offsetAt = steadyOffset(zone);
  return daysAround(span, zone)
    .map((day) => ({
      onAt: Math.max(span.from, instantOf(day + onMs, zone, offsetAt)),
      offAt: Math.min(span.to, instantOf(day + offMs, zone, offsetAt)),
    }))
    .filter(({ onAt, offAt }) => onAt < offAt);
}

/** Every calendar day of the span and the one before, whose light may run past midnight; local times read as UTC [ms]. */
function daysAround({ from, to }: Span, zone: string): number[] {
  const first = dateOf(from, zone) - DAY_MS;
  const count = (dateOf(to, zone) - first) / DAY_MS + 1;
  return Array.from({ length: count }, (_, index) => first + index * DAY_MS);
}

function dateOf(at: number, zone: string): number {
  const { year, month, day } = DateTime.fromMillis(at, { zone });
  return Date.UTC(year, month - 1, day);
}

function ofDayMs(clockTime: string): number {
  const [hours = 0, minutes = 0] = clockTime.split(':').map(Number);
  return (hours * 60 + minutes) * MINUTE_MS;
}

/** The instant of a local time that is read as UTC [ms]. */
function instantOf(asUtc: number, zone: string, offsetAt: (asUtc: number) => number | null): number {
  const offset = offsetAt(asUtc);
  if (offset !== null) return asUtc - offset * MINUTE_MS;
  const local = DateTime.fromMillis(asUtc, { zone: 'UTC' }).setZone(zone, { keepLocalTime: true });
  return Math.min(...local.getPossibleOffsets().map((possible) => possible.toMillis()));
}

/**
 * Offsets of a zone in weeks without a change of its clock. Asking for one is slow, and files ask for years of days.
 *
 * @param zone - IANA time zone.
 * @returns From a local time, read as UTC [ms], to its offset [min]; null where the clock may change nearby.
 */
function steadyOffset(zone: string): (asUtc: number) => number | null {
  const clock = IANAZone.create(zone);
  const known = new Map<number, number>();
  const beforeWeek = (week: number): number => {
    const offset = known.get(week) ?? clock.offset(week * WEEK_MS - DAY_MS);
    known.set(week, offset);
    return offset;
  };
  return (asUtc) => {
    const week = Math.floor(asUtc / WEEK_MS);
    const offset = beforeWeek(week);
    return offset === beforeWeek(week + 1) && offset === beforeWeek(week + 2) ? offset : null;
  };
}

function joined(stretches: readonly LampInterval[]): LampInterval[] {
  const result: LampInterval[] = [];
  for (const stretch of stretches) {
    const before = result.at(-1);
    if (before !== undefined && stretch.onAt <= before.offAt) {
      result.splice(-1, 1, { onAt: before.onAt, offAt: Math.max(before.offAt, stretch.offAt) });
    } else {
      result.push(stretch);
    }
  }
  return result;
}
