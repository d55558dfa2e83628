import { DomainError } from '../errors/domain-error';

/** A look at a sowing: how many had come up by then. */
export interface GerminationCount {
  /** Days since sowing [d], at least 0; looks need not be evenly spaced. */
  readonly day: number;
  /** Seedlings that had come up by that day, those lost since included. */
  readonly up: number;
}

/** How a sowing came up. A figure that the counts do not determine is null, never 0. */
export interface Germination {
  readonly sown: number;
  readonly up: number;
  /** Share of the seeds sown [%]. */
  readonly percent: number;
  /** Day of the look that found the first one [d]. */
  readonly firstDay: number | null;
  /** Day of the look that found the last one [d]. */
  readonly lastDay: number | null;
  /** From first to last [d]. */
  readonly spreadDays: number | null;
  /** Day of the look that found most, the first of equals [d]. */
  readonly modalDay: number | null;
  /** Day by which half of those that came up were up [d]. */
  readonly t50Days: number | null;
  /** Mean germination time [d]. */
  readonly meanTimeDays: number | null;
  /** Variance of the germination time [d²]; null for fewer than two seedlings. */
  readonly varianceDays2: number | null;
  /** Standard error of the mean germination time [d]. */
  readonly standardErrorDays: number | null;
  /** Mean germination rate, the inverse of the mean time [1/d]. */
  readonly ratePerDay: number | null;
}

/** Whose half counts: `farooq` takes N/2, `coolbear` (N + 1)/2, of the N that came up in the end. */
export type HalfwayMethod = 'farooq' | 'coolbear';

/** Seedlings that one look found new. */
interface Newcomers {
  readonly day: number;
  readonly count: number;
}

/**
 * Figures of a sowing from the looks at it.
 *
 * @param sown - Seeds sown, a whole number of at least 1.
 * @param counts - Looks in order of days; each says how many had come up by then. A count that falls, because seedlings
 *   were lost, does not undo their coming up: the highest so far stands.
 * @param method - How half is counted for T50.
 * @returns The figures. N is the number that came up, not the number sown, in all but `percent`.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for counts that are not whole numbers from 0 to the number sown or days
 *   below 0; `UNORDERED_SERIES` for days that do not increase.
 *
 * @remarks
 * T50 is interpolated between the looks on either side of the half; a look that found exactly half is the answer
 * itself. Where the first look already found more than half it is not determined: null. A look at day 0 that found none
 * is a look. Sources: Farooq et al. (2005) and Coolbear et al. (1984) for T50, Ellis & Roberts (1980) for the mean time,
 * with the variance over N − 1, as the R package germinationmetrics states them.
 */
export function germinationOf(
  sown: number,
  counts: readonly GerminationCount[],
  method: HalfwayMethod = 'farooq',
): Germination {
  requireCounts(sown, counts);
  const looks = cumulative(counts);
  const finds = newcomers(looks);
  const up = looks.at(-1)?.up ?? 0;
  const firstDay = finds[0]?.day ?? null;
  const lastDay = finds.at(-1)?.day ?? null;
  return {
    sown,
    up,
    percent: (100 * up) / sown,
    firstDay,
    lastDay,
    spreadDays: firstDay === null || lastDay === null ? null : lastDay - firstDay,
    modalDay: modalDay(finds),
    t50Days: up === 0 ? null : dayOfCount(looks, method === 'farooq' ? up / 2 : (up + 1) / 2),
    ...momentsOf(finds, up),
  };
}

/** The looks with counts that never fall. */
function cumulative(counts: readonly GerminationCount[]): GerminationCount[] {
  let highest = 0;
  return counts.map(({ day, up }) => {
    highest = Math.max(highest, up);
    return { day, up: highest };
  });
}

function newcomers(looks: readonly GerminationCount[]): Newcomers[] {
  return looks
    .map(({ day, up }, index) => ({ day, count: up - (looks[index - 1]?.up ?? 0) }))
    .filter(({ count }) => count > 0);
}

function modalDay(finds: readonly Newcomers[]): number | null {
  const most = Math.max(...finds.map(({ count }) => count));
  return finds.find(({ count }) => count === most)?.day ?? null;
}

function dayOfCount(looks: readonly GerminationCount[], target: number): number | null {
  const index = looks.findIndex(({ up }) => up >= target);
  const after = looks[index];
  const before = looks[index - 1];
  if (after === undefined) return null;
  if (after.up === target) return after.day;
  if (before === undefined) return null;
  return before.day + ((target - before.up) * (after.day - before.day)) / (after.up - before.up);
}

function momentsOf(
  finds: readonly Newcomers[],
  up: number,
): Pick<Germination, 'meanTimeDays' | 'varianceDays2' | 'standardErrorDays' | 'ratePerDay'> {
  if (up === 0) {
    return { meanTimeDays: null, varianceDays2: null, standardErrorDays: null, ratePerDay: null };
  }
  const meanTimeDays = finds.reduce((sum, { day, count }) => sum + day * count, 0) / up;
  const squares = finds.reduce((sum, { day, count }) => sum + count * (day - meanTimeDays) ** 2, 0);
  const varianceDays2 = up < 2 ? null : squares / (up - 1);
  return {
    meanTimeDays,
    varianceDays2,
    standardErrorDays: varianceDays2 === null ? null : Math.sqrt(varianceDays2 / up),
    // Found up on the day of sowing: there is no rate to speak of.
    ratePerDay: meanTimeDays === 0 ? null : 1 / meanTimeDays,
  };
}

function requireCounts(sown: number, counts: readonly GerminationCount[]): void {
  if (!Number.isInteger(sown) || sown < 1) {
    throw new DomainError('INVALID_ARGUMENT', 'sown must be a whole number of at least 1', { sown });
  }
  let previousDay = -Infinity;
  for (const { day, up } of counts) {
    const isCount = Number.isInteger(up) && up >= 0 && up <= sown && Number.isFinite(day) && day >= 0;
    if (!isCount) {
      throw new DomainError('INVALID_ARGUMENT', 'a count is a whole number from 0 to those sown', {
        day,
        up,
        sown,
      });
    }
    if (day <= previousDay) {
      throw new DomainError('UNORDERED_SERIES', 'days of counts must increase', { previousDay, day });
    }
    previousDay = day;
  }
}
