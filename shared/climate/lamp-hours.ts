import { DateTime } from 'luxon';

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
  const daysOn = switchesOff < switchesOn ? 1 : 0;
  return daysAround(span, zone)
    .map((day) => ({
      onAt: Math.max(span.from, instantOf(day, switchesOn, zone)),
      offAt: Math.min(span.to, instantOf(day.plus({ days: daysOn }), switchesOff, zone)),
    }))
    .filter(({ onAt, offAt }) => onAt < offAt);
}

/** Every calendar day of the span and the one before, whose light may run past midnight; as dates without a zone. */
function daysAround({ from, to }: Span, zone: string): DateTime[] {
  const first = dateOf(from, zone).minus({ days: 1 });
  const last = dateOf(to, zone);
  const count = Math.round(last.diff(first, 'days').days) + 1;
  return Array.from({ length: count }, (_, index) => first.plus({ days: index }));
}

function dateOf(at: number, zone: string): DateTime {
  const { year, month, day } = DateTime.fromMillis(at, { zone });
  return DateTime.utc(year, month, day);
}

function instantOf({ year, month, day }: DateTime, clockTime: string, zone: string): number {
  const [hour, minute] = clockTime.split(':').map(Number);
  const local = DateTime.fromObject({ year, month, day, hour, minute }, { zone });
  return Math.min(...local.getPossibleOffsets().map((possible) => possible.toMillis()));
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
