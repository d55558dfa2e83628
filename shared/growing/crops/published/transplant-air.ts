import { CORNELL, DELAWARE, UTAH } from './transplant-sources';

/** Air temperatures for raising transplants [°F], as one source prints them. */
export interface PrintedAir {
  readonly dayF: readonly [low: number, high: number];
  readonly nightF: readonly [low: number, high: number];
  readonly source: string;
}

const air = (
  source: string,
  day: readonly [number, number],
  night: readonly [number, number],
): PrintedAir => ({
  dayF: day,
  nightF: night,
  source,
});

/** Air temperatures for raising transplants; lettuce nights are 40, 45 or 50 °F, by whom one asks. */
export const transplantAirF = {
  broccoli: [air(DELAWARE, [65, 70], [60, 60])],
  cabbage: [air(DELAWARE, [65, 65], [60, 60])],
  lettuce: [
    air(DELAWARE, [60, 65], [40, 40]),
    air(UTAH, [60, 65], [45, 45]),
    air(CORNELL, [60, 65], [50, 50]),
  ],
  onion: [air(DELAWARE, [65, 70], [60, 60]), air(UTAH, [65, 70], [60, 60]), air(CORNELL, [65, 70], [55, 60])],
  pepper: [
    air(DELAWARE, [70, 75], [60, 60]),
    air(UTAH, [75, 80], [65, 65]),
    air(CORNELL, [70, 75], [60, 60]),
  ],
  tomato: [
    air(DELAWARE, [65, 75], [60, 60]),
    air(UTAH, [65, 75], [60, 60]),
    air(CORNELL, [65, 70], [60, 60]),
  ],
  aubergine: [
    air(DELAWARE, [70, 85], [65, 65]),
    air(UTAH, [75, 85], [65, 65]),
    air(CORNELL, [70, 80], [60, 60]),
  ],
  cucumber: [air(DELAWARE, [70, 75], [65, 65])],
  celery: [air(CORNELL, [65, 65], [60, 60])],
} as const satisfies Readonly<Record<string, readonly PrintedAir[]>>;
