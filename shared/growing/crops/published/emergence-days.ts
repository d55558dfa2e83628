/** Soil temperatures of both tables [°C]; printed as 32, 41 … 104 °F. */
export const trialTemperaturesC = [0, 5, 10, 15, 20, 25, 30, 35, 40] as const;

/** Days to emergence; `none` germinated, null was not tested. */
export type EmergenceDays = readonly (number | 'none' | null)[];

/** Source of {@link emergenceDays}. */
export const HARRINGTON_MINGES = 'Harrington & Minges (1954), seed ½ inch deep, by extension copies';

const none = 'none';

/**
 * Days to emergence of seed half an inch (13 mm) deep, at {@link trialTemperaturesC}.
 *
 * @remarks
 * Copies disagree by a day or two: the Oregon State copy prints asparagus 11 and 19 for 12 and 20 (30, 35 °C), beetroot 4
 * and 4 for 5 and 5, cabbage 4 and 3 for 5 and 4, cauliflower 19 (10 °C) and 4 (30 °C), lettuce 2 for 3 (30 °C); its
 * aubergine row has slipped one column. A seed catalogue prints none for snap bean at 35 °C. Take them as ±1 day.
 */
export const emergenceDays = {
  asparagus: [none, none, 53, 24, 15, 10, 12, 20, 28],
  limaBean: [null, null, none, 31, 18, 7, 7, none, null],
  snapBean: [none, none, none, 16, 11, 8, 6, 6, none],
  beetroot: [null, 42, 17, 10, 6, 5, 5, 5, null],
  cabbage: [null, null, 15, 9, 6, 5, 4, null, null],
  carrot: [none, 51, 17, 10, 7, 6, 6, 9, none],
  cauliflower: [null, null, 20, 10, 6, 5, 5, null, null],
  celery: [none, 41, 16, 12, 7, none, none, none, null],
  sweetCorn: [none, none, 22, 12, 7, 4, 4, 3, none],
  cucumber: [none, none, none, 13, 6, 4, 3, 3, null],
  aubergine: [null, null, null, null, 13, 8, 5, null, null],
  lettuce: [49, 15, 7, 4, 3, 2, 3, none, none],
  melon: [null, null, null, null, 8, 4, 3, null, null],
  okra: [none, none, none, 27, 17, 13, 7, 6, 7],
  onion: [136, 31, 13, 7, 5, 4, 4, 13, none],
  parsley: [null, null, 29, 17, 14, 13, 12, null, null],
  parsnip: [172, 57, 27, 19, 14, 15, 32, none, none],
  pea: [null, 36, 14, 9, 8, 6, 6, null, null],
  pepper: [none, none, none, 25, 13, 8, 8, 9, none],
  radish: [none, 29, 11, 6, 4, 4, 3, null, null],
  spinach: [63, 23, 12, 7, 6, 5, 6, none, none],
  tomato: [none, none, 43, 14, 8, 6, 6, 9, none],
  turnip: [none, none, 5, 3, 2, 1, 1, 1, 3],
  watermelon: [null, none, null, null, 12, 5, 4, 3, null],
} as const satisfies Readonly<Record<string, EmergenceDays>>;
