/** Soil temperatures for germination [°F], as printed; null where a copy does not say. */
export interface PrintedTemperatures {
  readonly minF: number;
  readonly optimumF: readonly [low: number, high: number];
  readonly bestF: number | null;
  readonly maxF: number;
}

/** Source of {@link germinationTemperaturesF}. */
export const HARRINGTON_OREGON = 'Harrington, by Oregon State University Extension';
/** Source of {@link otherGerminationTemperaturesF}. */
export const MASTER_GARDENER_GN154 =
  'University of California, GN 154 Sacramento, after the California Master Gardener Handbook, table 5.2';

const row = (
  minF: number,
  low: number,
  high: number,
  bestF: number | null,
  maxF: number,
): PrintedTemperatures => ({
  minF,
  optimumF: [low, high],
  bestF,
  maxF,
});

/** Lowest, best and highest soil temperature for germination [°F]: minimum, optimum range, optimum, maximum. */
export const germinationTemperaturesF = {
  asparagus: row(50, 60, 85, 75, 95),
  snapBean: row(60, 60, 85, 80, 95),
  beetroot: row(40, 50, 85, 85, 95),
  cabbage: row(40, 45, 95, 85, 100),
  carrot: row(40, 45, 85, 80, 95),
  cauliflower: row(40, 45, 85, 80, 100),
  chard: row(40, 50, 85, 85, 95),
  sweetCorn: row(50, 60, 95, 95, 105),
  cucumber: row(60, 60, 95, 95, 105),
  aubergine: row(60, 75, 90, 85, 95),
  lettuce: row(35, 40, 80, 75, 95),
  melon: row(60, 75, 95, 90, 100),
  onion: row(35, 50, 95, 75, 95),
  parsley: row(40, 50, 85, 75, 90),
  parsnip: row(35, 50, 70, 65, 85),
  pea: row(40, 40, 75, 75, 85),
  pepper: row(60, 65, 95, 85, 95),
  pumpkin: row(60, 70, 90, 95, 100),
  radish: row(40, 45, 90, 85, 95),
  spinach: row(35, 45, 75, 70, 85),
  squash: row(60, 70, 95, 95, 100),
  tomato: row(50, 60, 85, 85, 95),
  turnip: row(40, 60, 105, 85, 105),
  watermelon: row(60, 70, 95, 95, 105),
} as const satisfies Readonly<Record<string, PrintedTemperatures>>;

/**
 * Rows of another copy that contradict the first or stand alone. It also gives lettuce, onion, spinach and parsnip a
 * minimum of 32 °F (first copy: 35), pepper an optimum of 65–75 °F (65–95) and lettuce a maximum of 85 °F (95).
 */
export const otherGerminationTemperaturesF = {
  leek: row(32, 65, 85, null, 95),
  tomato: row(50, 65, 85, null, 95),
} as const satisfies Readonly<Record<string, PrintedTemperatures>>;
