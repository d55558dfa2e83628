/** Source of {@link seedLifeYears}. */
export const KNOTT = 'Knott’s Handbook for Vegetable Growers, 4th ed., by Iowa State University Extension';
/** Source of {@link otherSeedLifeYears}. */
export const OTHER_SEED_LIFE = 'another extension table';
/** Source of {@link oldSeedLifeYears}. */
export const OLD_SEED_LIFE = 'a table in the style of 1914';

/** Years that seed keeps in favourable storage. */
export const seedLifeYears = {
  asparagus: 3,
  snapBean: 3,
  beetroot: 4,
  broccoli: 3,
  brusselsSprouts: 4,
  cabbage: 4,
  carrot: 3,
  celeriac: 3,
  cauliflower: 4,
  celery: 3,
  chard: 4,
  chicory: 4,
  chineseCabbage: 3,
  collards: 5,
  sweetCorn: 2,
  cucumber: 5,
  aubergine: 4,
  endive: 5,
  fennel: 4,
  kale: 4,
  kohlrabi: 3,
  leek: 2,
  lettuce: 6,
  melon: 5,
  mustard: 4,
  newZealandSpinach: 3,
  okra: 2,
  onion: 1,
  parsley: 1,
  parsnip: 1,
  pea: 3,
  pepper: 2,
  pumpkin: 4,
  radish: 5,
  rutabaga: 4,
  salsify: 1,
  spinach: 3,
  squash: 4,
  tomato: 4,
  turnip: 4,
  watermelon: 4,
} as const satisfies Readonly<Record<string, number>>;

/** Years by a second table, where it was read: it contradicts the first for onion, leek and lettuce. */
export const otherSeedLifeYears = {
  onion: 2,
  leek: 3,
  lettuce: 5,
  tomato: 4,
  basil: 5,
} as const satisfies Readonly<Record<string, number>>;

/** Years by a third, older table, where it was read. */
export const oldSeedLifeYears = {
  leek: 3,
  lettuce: 4,
  pepper: 3,
  tomato: 5,
  onion: 1,
  carrot: 1,
} as const satisfies Readonly<Record<string, number>>;
