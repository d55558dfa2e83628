import type { Series } from '../series/series';
import {
  hoursUntilDue,
  learnedInterval,
  thirstSince,
  wateringStanding,
  type WateringInterval,
} from './watering';

/** When a planting was watered, and how much where that was noted. */
export interface Watering {
  /** [ms since epoch] */
  readonly at: number;
  /** [ml]; null when not noted. */
  readonly millilitres: number | null;
}

/** A time between two waterings. */
export interface DryingSpan {
  readonly from: number;
  /** The watering that ended it; null while it runs. */
  readonly to: number | null;
  /** Vapour pressure deficit over the covered time [kPa·h]; null where nothing is covered. */
  readonly integralKPaH: number | null;
  /** Covered share, 0 to 1. */
  readonly coverage: number;
  /** Of the watering that ended it [ml]. */
  readonly millilitres: number | null;
  readonly isLearnedFrom: boolean;
}

/** How far a planting has dried, by the air alone. */
export interface Drying {
  readonly spans: readonly DryingSpan[];
  /** Null before it has taught enough. */
  readonly interval: WateringInterval | null;
  /** Null without an interval, or where too little was measured since the last watering. */
  readonly standing: 'notYet' | 'soon' | 'due' | null;
  /** When it will be due if the air stays as thirsty as in the last day [ms]; null where that can't be told. */
  readonly dueAt: number | null;
}

/** From a span with less of it measured nothing is learned. */
const LEAST_COVERAGE_TO_LEARN = 0.9;
/** With less of it measured, a running span says nothing: the fallback does. */
const LEAST_COVERAGE_TO_TELL = 0.7;
const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

/**
 * What a planting's waterings and the air tell of its drying.
 *
 * @param waterings - In order; the first span begins with `startedAt`, when the planting was watered in.
 * @param air - Vapour pressure deficit where it stood [kPa], from `startedAt` on.
 * @param options - `startedAt` and `now` [ms]; `maxGapMs`, the longest interval between samples that is not a gap [ms].
 * @returns Spans, and what follows from them.
 */
export function dryingOf(
  waterings: readonly Watering[],
  air: Series,
  {
    startedAt,
    now,
    maxGapMs,
  }: { readonly startedAt: number; readonly now: number; readonly maxGapMs: number },
): Drying {
  const begun = waterings.filter(({ at }) => at > startedAt && at <= now);
  const spanOf = (from: number, end: Watering | null): DryingSpan => {
    const to = end?.at ?? Math.max(now, from + 1);
    const { integralKPaH, coverage } = thirstSince(air, { from, to, maxGapMs });
    return {
      from,
      to: end?.at ?? null,
      integralKPaH,
      coverage,
      millilitres: end?.millilitres ?? null,
      isLearnedFrom: end !== null && integralKPaH !== null && coverage >= LEAST_COVERAGE_TO_LEARN,
    };
  };
  const starts = [startedAt, ...begun.map(({ at }) => at)];
  const spans = starts.flatMap((from, index) => {
    const end = begun[index] ?? null;
    return end !== null && end.at <= from ? [] : [spanOf(from, end)];
  });
  const learned = spans.flatMap(({ isLearnedFrom, integralKPaH }) =>
    isLearnedFrom && integralKPaH !== null ? [Math.max(0, integralKPaH)] : [],
  );
  const interval = learnedInterval(learned);
  const running = spans.at(-1);
  const since = running === undefined ? null : sinceKPaH(running, now, maxGapMs);
  if (interval === null || since === null) return { spans, interval, standing: null, dueAt: null };
  const lastDay = thirstSince(air, { from: now - DAY_MS, to: now, maxGapMs });
  const meanVpdKPa =
    lastDay.integralKPaH === null ? 0 : lastDay.integralKPaH / ((lastDay.coverage * DAY_MS) / HOUR_MS);
  const hours = hoursUntilDue(since, interval, meanVpdKPa);
  return {
    spans,
    interval,
    standing: wateringStanding(since, interval),
    dueAt: hours === null ? null : now + hours * HOUR_MS,
  };
}

/** The integral of the running span; nothing just after a watering, before anything is measured. Null for too little. */
function sinceKPaH(
  { from, integralKPaH, coverage }: DryingSpan,
  now: number,
  maxGapMs: number,
): number | null {
  if (now - from <= maxGapMs) return integralKPaH ?? 0;
  return coverage >= LEAST_COVERAGE_TO_TELL ? integralKPaH : null;
}
