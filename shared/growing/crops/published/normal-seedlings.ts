/** Percent of normal seedlings; null where the print says 0 beside a day count, so is missing. */
export type NormalSeedlings = readonly (number | null)[];

/** Source of {@link normalSeedlingsPct}. */
export const HARRINGTON_SEEDLINGS = 'Harrington, percentage of normal seedlings, by extension copies';

/** Percent of normal seedlings at the temperatures of the emergence trial, 0 to 40 °C in steps of 5. */
export const normalSeedlingsPct = {
  asparagus: [0, 0, 61, 80, 88, 95, 79, 37, 0],
  limaBean: [0, 0, 1, 52, 82, 90, 88, 2, 0],
  snapBean: [0, 0, 1, 97, 90, 97, 47, 39, 0],
  beetroot: [0, 53, 72, 88, 90, 97, 89, 35, 0],
  cabbage: [0, 27, 78, 93, null, 99, null, 0, 0],
  carrot: [0, 48, 93, 95, 96, 96, 95, 74, 0],
  cauliflower: [0, 0, 58, 60, null, 63, 45, 0, 0],
  celery: [0, 72, 70, 40, 97, 65, 0, 0, 0],
  cucumber: [0, 0, 0, 95, 99, 99, 99, 99, 49],
  aubergine: [0, 0, 0, 0, 21, 53, 60, 0, 0],
  lettuce: [98, 98, 98, 99, 99, 99, 12, 0, 0],
  melon: [0, 0, 0, 0, 38, 94, 90, 0, 0],
  okra: [0, 0, 0, 74, 89, 92, 88, 85, 35],
  onion: [90, 98, 98, 98, 99, 97, 91, 73, 2],
  parsley: [0, 0, 63, null, 69, 64, 50, 0, 0],
  parsnip: [82, 87, 79, 85, 89, 77, 51, 1, 0],
  pea: [0, 89, 94, 93, 93, 94, 86, 0, 0],
  pepper: [0, 0, 1, 70, 96, 98, 95, 70, 0],
  radish: [0, 42, 76, 97, 95, 97, 95, 0, 0],
  spinach: [83, 96, 91, 82, 52, 28, 32, 0, 0],
  sweetCorn: [0, 0, 47, 97, 97, 98, 91, 88, 10],
  tomato: [0, 0, 82, 98, 98, 97, 83, 46, 0],
  turnip: [1, 14, 79, 98, 99, 100, 99, 99, 88],
  watermelon: [0, 0, 0, 17, 94, 90, 92, 96, 0],
} as const satisfies Readonly<Record<string, NormalSeedlings>>;
