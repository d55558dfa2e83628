import type { DayLengthYear } from '@shared/contracts/sowing';
import { formatNumber, formatValue } from '@shared/format/numbers';
import type { OnionClass } from '@shared/growing/onion-class';
import type { ChartLine } from '../../ui/chart/chart-data';

/** What each class of onions is called. */
export const onionNames: Readonly<Record<OnionClass, string>> = {
  short: 'short-day',
  intermediate: 'intermediate-day',
  long: 'long-day',
};

/** The day's length through the year, and above it or below where the onions of the place form bulbs. */
export function dayLengthLines({ days, bulbing, onionClasses }: DayLengthYear): ChartLine[] {
  const line = (name: string, hoursOf: (hours: number) => number): ChartLine => ({
    name,
    unit: 'h',
    decimals: 1,
    points: days.map(({ day, hours }) => {
      const shown = hoursOf(hours);
      return [Date.parse(`${day}T12:00:00Z`), shown, shown, shown] as const;
    }),
  });
  const suitable = bulbing.filter(({ onion }) => onionClasses.includes(onion));
  return [
    line('Length of the day', (hours) => hours),
    ...suitable.map(({ onion, fromHours }) =>
      line(`${onionNames[onion]} onions bulb from ${formatNumber(fromHours, 0)} h`, () => fromHours),
    ),
  ];
}

/** Which onions suit the place: "Onions for here: long-day." */
export function onionText({ onionClasses }: Pick<DayLengthYear, 'onionClasses'>): string {
  const names = onionClasses.map((onion) => onionNames[onion]);
  if (names.length < 2) return `Onions for here: ${names.join('')}.`;
  return `Onions for here: ${names.join(' or ')}; growers at this latitude disagree.`;
}

/** The longest and the shortest day: "17.0 h on 21 Jun, 7.5 h on 21 Dec". */
export function extremesText(
  { longest, shortest }: Pick<DayLengthYear, 'longest' | 'shortest'>,
  dayWords: (day: string) => string,
): string {
  return [longest, shortest]
    .filter((day) => day !== null)
    .map(({ day, hours }) => `${formatValue(hours, 'h', 1)} on ${dayWords(day)}`)
    .join(', ');
}
