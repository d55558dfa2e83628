import type { PlantingDrying } from '@shared/contracts/care-record';
import { formatNumber, formatRange, formatValue } from '@shared/format/numbers';
import type { ChartLine, ChartMark, WantedSpan } from '../../ui/chart/chart-data';

/** Unit of the vapour pressure deficit summed over time. */
export const dryingUnit = 'kPa·h';

/** The drying as it grew, falling to nothing at each watering; no line without a reading. */
export function dryingLines({ curve }: Pick<PlantingDrying, 'curve'>): ChartLine[] {
  // Where nothing was measured the sum stays at nothing; a flat line would look like damp air.
  if (curve.every(({ integralKPaH }) => integralKPaH === 0)) return [];
  const points = curve.map(({ at, integralKPaH: value }) => [Date.parse(at), value, value, value] as const);
  return [{ name: 'Taken by the air since watering', unit: dryingUnit, decimals: 1, points }];
}

/** The band within which it usually asked for water; none before it has taught enough. */
export function dryingBand({ curve, interval }: Pick<PlantingDrying, 'curve' | 'interval'>): WantedSpan[] {
  const [first, last] = [curve[0], curve.at(-1)];
  if (interval === null || first === undefined || last === undefined) return [];
  return [
    {
      from: Date.parse(first.at),
      to: Date.parse(last.at),
      low: interval.lowKPaH,
      high: interval.highKPaH,
    },
  ];
}

/** Every watering as a mark. */
export function wateringMarks({ spans }: Pick<PlantingDrying, 'spans'>): ChartMark[] {
  return spans.flatMap(({ to, millilitres }) =>
    to === null
      ? []
      : [
          {
            at: Date.parse(to),
            icon: 'water_drop',
            text: millilitres === null ? 'Watered' : `Watered, ${formatValue(millilitres, 'ml', 0)}`,
          },
        ],
  );
}

/**
 * What a planting has taught about its thirst.
 *
 * @param drying - As far as it is known.
 * @param dueWords - When it will be due if the air stays as it is; null where that can't be told.
 */
export function dryingWords(
  { interval, standing, fallbackDays, spans }: PlantingDrying,
  dueWords: string | null,
): string {
  if (interval === null) {
    const taught = spans.filter(({ isLearnedFrom }) => isLearnedFrom).length;
    const meanwhile =
      fallbackDays === null
        ? ''
        : ` Until then it counts ${fallbackDays} ${fallbackDays === 1 ? 'day' : 'days'}.`;
    const soFar = taught === 0 ? '' : ` So far ${taught} ${taught === 1 ? 'has' : 'have'} taught.`;
    return `Its thirst is not known yet: it takes some waterings with readings of temperature and humidity between them.${soFar}${meanwhile}`;
  }
  const usual = `It asks for water after about ${formatNumber(interval.medianKPaH, 0)} ${dryingUnit} (${formatRange({ low: interval.lowKPaH, high: interval.highKPaH }, dryingUnit, 0)}, from ${interval.count} waterings).`;
  const now = { notYet: ' Not yet now', soon: ' Soon now', due: ' Now it is due' };
  const standingWords = standing === null ? '' : now[standing];
  const due = standing === 'due' || dueWords === null ? '' : `, ${dueWords} if the air stays as thirsty`;
  return standing === null ? usual : `${usual}${standingWords}${due}.`;
}
