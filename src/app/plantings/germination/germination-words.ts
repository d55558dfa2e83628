import type { EmergenceForecastView, GerminationView } from '@shared/contracts/germination';
import { formatNumber, formatValue, noValue } from '@shared/format/numbers';

/** A figure of a sowing, with what it means. */
export interface GerminationFact {
  readonly word: string;
  readonly meaning: string;
  readonly value: string;
}

/** The figures of a sowing, each with its meaning. What is not known yet is a dash. */
export function germinationFacts(germination: GerminationView): readonly GerminationFact[] {
  const { percent, sown, up, verdict, firstDay, t50Days, meanTimeDays, standardErrorDays, spreadDays } =
    germination;
  const range =
    verdict === null
      ? ''
      : `, truly ${formatNumber(verdict.lowPct, 0)} to ${formatValue(verdict.highPct, '%', 0)}`;
  const error = standardErrorDays === null ? '' : ` ± ${formatNumber(standardErrorDays, 1)}`;
  return [
    {
      word: 'Up',
      meaning:
        'Of all seeds sown. The range holds the true share of such seed in 95 of 100 sowings: few seeds say little.',
      value: `${up} of ${sown}, ${formatValue(percent, '%', 0)}${up === 0 ? '' : range}`,
    },
    {
      word: 'First up',
      meaning: 'The day after sowing on which the first were counted.',
      value: dayWords(firstDay),
    },
    {
      word: 'T50',
      meaning:
        'The day by which half of those that came up were up, read between the counts before and after. There is none where half were up at the first look.',
      value: dayWords(t50Days),
    },
    {
      word: 'Mean time',
      meaning:
        'The mean of the days that each seedling took, counted to the look at which it was seen. The ± is its standard error.',
      value: meanTimeDays === null ? noValue : `${formatNumber(meanTimeDays, 1)}${error} days`,
    },
    {
      word: 'Spread',
      meaning: 'Days from the first to the last seedling. Old or cold seed comes up over a longer time.',
      value:
        spreadDays === null
          ? noValue
          : formatValue(spreadDays, spreadDays === 1 ? 'day' : 'days', decimals(spreadDays)),
    },
  ];
}

function dayWords(day: number | null): string {
  return day === null ? noValue : `day ${formatNumber(day, decimals(day))}`;
}

function decimals(days: number): number {
  return Number.isInteger(days) ? 0 : 1;
}

/**
 * How the sowing compares with its lot's test and with the standard; empty while neither is known, and while more may
 * come: it would be judged by half of itself.
 */
export function verdictWords({ verdict, isOpen }: GerminationView): readonly string[] {
  if (verdict === null || isOpen) return [];
  const against = { lower: 'fewer than', asExpected: 'about as', higher: 'more than' };
  const lines: string[] = [];
  if (verdict.againstLot !== null && verdict.lotPct !== null)
    lines.push(
      `Came up ${against[verdict.againstLot]} the lot’s own test promised (${formatValue(verdict.lotPct, '%', 0)}).`,
    );
  if (verdict.againstStandard !== null && verdict.standardPct !== null)
    lines.push(
      `That is ${against[verdict.againstStandard]} the least for seed on sale (${formatValue(verdict.standardPct, '%', 0)}${verdict.standardSource === null ? '' : `, ${verdict.standardSource}`}).`,
    );
  if (verdict.age === 'pastLife') lines.push('The seed was past the life that the sources give it.');
  if (verdict.age === 'doubtful') lines.push('The seed was older than some sources let it keep.');
  return lines;
}

/**
 * When to look for the first seedlings, in a sentence.
 *
 * @param day - Says an instant as a day of the room.
 */
export function forecastWords(forecast: EmergenceForecastView, day: (at: string) => string): string {
  const { earliest, latest } = forecast;
  const [from, to] = [earliest?.at ?? null, latest?.at ?? null];
  if (earliest === null && latest === null)
    return 'When to look for the first can’t be said: nothing is published for this crop, or no temperature was measured.';
  if (from === null && to === null)
    return 'At this temperature it never comes up, by every source. Is it warm enough?';
  if (from !== null && to === null)
    return `First seedlings not before ${day(from)}; by one source it stays too cold or too warm for any.`;
  if (from === null || to === null) return `First seedlings about ${day(from ?? to ?? '')}.`;
  const span = day(from) === day(to) ? day(from) : `from ${day(from)} to ${day(to)}`;
  return forecast.isLate ? `They were expected ${span}.` : `First seedlings expected ${span}.`;
}

/** What the forecast rests on: whose figures, which temperature, and how much of it was measured. */
export function forecastBasis(
  { basis, earliest, latest, measuredBy, coverage }: EmergenceForecastView,
  outlook: string | null,
): string {
  const sources = [...new Set([earliest?.source, latest?.source].filter((one) => one !== undefined))];
  const whose = basis === 'room' ? 'By earlier sowings in this room' : `By ${sources.join(' and ')}`;
  const where = measuredBy === 'rootZoneTemperature' ? 'root zone' : 'air';
  if (measuredBy === null) return `${whose}; no temperature was measured, so a usual one is taken.`;
  const on = outlook === null ? '' : `, going on at ${outlook}`;
  return `${whose}; counted from the ${where} since sowing (${formatValue(coverage * 100, '%', 0)} of the time measured)${on}.`;
}
