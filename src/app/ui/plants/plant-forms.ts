import { blade, filled, leaf, line, pot, round, type Shape } from './leaf-shapes';

/** What a planting looks like on its shelf, by habit and stage. */
export type PlantForm =
  | 'sown'
  | 'hook'
  | 'twoLeaves'
  | 'blades'
  | 'leafy'
  | 'bush'
  | 'rosette'
  | 'fruiting'
  | 'tree'
  | 'resting'
  | 'empty';

/** Which colours a plant has, and which fruit. */
export type PlantFamily =
  'leek' | 'onion' | 'pepper' | 'tomato' | 'herb' | 'strawberry' | 'citrus' | 'lettuce';

/** A drawing standing on y = 0, with the room it takes at full size. */
export interface PlantPicture {
  readonly shapes: readonly Shape[];
  readonly breadth: number;
  readonly height: number;
}

const potHeight = 10;

const sown: PlantPicture = {
  breadth: 11,
  height: 6,
  shapes: [filled('soil', 'M-5 0Q0-3.4 5 0z'), round('seed', -2.1, -2.1, 1.25), round('seed', 2, -1.9, 1.15)],
};

const hook: PlantPicture = {
  breadth: 13,
  height: 14,
  shapes: [
    filled('soil', 'M-4.5 0Q0-2.4 4.5 0z'),
    line('leaf', 'M0 0V-7.6Q.2-12.2 3.2-11.4Q4.9-10.8 4.4-7.4', 1.9),
    round('seed', 4.3, -6.6, 1.35),
  ],
};

const twoLeaves: PlantPicture = {
  breadth: 22,
  height: 20,
  shapes: [
    line('stem', 'M0 0Q-.5-6 0-12', 1.7),
    leaf('leaf', 0, -12, 22, 10.5, 7),
    leaf('leaf', 0, -12, 158, 10.5, 7),
    leaf('shade', 0, -12.4, 70, 6, 3.4),
    leaf('leaf', 0, -12.4, 108, 6.6, 3.6),
  ],
};

const blades: PlantPicture = {
  breadth: 19,
  height: 33,
  shapes: [
    blade('shade', 0.4, 24, 9, 3),
    blade('shade', -0.6, 26, -7.5, 3),
    blade('leaf', 0, 32, 2.4, 3.4),
    blade('leaf', -0.8, 29, -3.6, 3.2),
    blade('leaf', 0.8, 27, 5.6, 3),
    line('vein', 'M-1.5 0H1.5', 2.2),
  ],
};

/** Leaf pairs up a stem, the upper ones smaller and more upright. */
function pairs(ground: number, height: number, count: number): Shape[] {
  return Array.from({ length: count }, (_, pair) => {
    const up = (pair + 1) / count;
    const y = ground - height * (0.2 + 0.72 * up);
    const size = 15 - 5.6 * up;
    const rise = 8 + 34 * up;
    return [
      leaf('shade', 0, y, rise, size, size * 0.56),
      leaf('leaf', 0, y, 180 - rise, size, size * 0.56),
      leaf('leaf', 0, y - 1.8, rise + 16, size * 0.72, size * 0.4),
    ];
  }).flat();
}

function stalk(ground: number, height: number): Shape {
  return line('stem', `M0 ${ground}Q.8 ${ground - height / 2} 0 ${ground - height}`, 2);
}

const crownTip = (y: number): Shape[] => [leaf('leaf', 0, y, 76, 9, 4.6), leaf('shade', 0, y, 108, 8, 4.2)];

const leafy: PlantPicture = {
  breadth: 30,
  height: 36,
  shapes: [stalk(0, 27), ...pairs(0, 27, 4), ...crownTip(-26)],
};

/** Leaves that lie over a rounded mound from behind to in front. */
const bush: PlantPicture = {
  breadth: 34,
  height: 27,
  shapes: [
    filled('shade', 'M-14 0Q-17-9-9.5-15Q-6-23 1-22Q9-22 10.5-14Q17-9 14 0z'),
    ...[160, 128, 90, 56, 22].map((way) => leaf('leaf', 0, -11, way, 14, 8.4)),
    ...[172, 140, 104, 74, 38, 8].map((way) => leaf('shade', 0, -6, way, 13, 6.4)),
    ...[152, 118, 62, 30].map((way) => leaf('leaf', 0, -2, way, 12.5, 7)),
  ],
};

/** Broad leaves that open from the ground. */
const rosette: PlantPicture = {
  breadth: 30,
  height: 18,
  shapes: [
    ...[156, 118, 62, 24].map((way) => leaf('shade', 0, -1, way, 15, 9)),
    ...[168, 136, 90, 44, 12].map((way) => leaf('leaf', 0, -0.6, way, 14, 8.6)),
    ...[112, 70].map((way) => leaf('shade', 0, -0.6, way, 8.6, 6)),
    leaf('leaf', 0, -0.6, 92, 7, 5.4),
  ],
};

const tomato: PlantPicture = {
  breadth: 32,
  height: 50,
  shapes: [
    stalk(-potHeight, 32),
    ...pairs(-potHeight, 32, 5),
    ...crownTip(-potHeight - 31),
    round('fruit', -7.5, -19, 3.3),
    round('fruit', -3.2, -16.6, 3),
    round('fruit', 7.2, -25, 3.2),
    round('fruit', -6, -31.5, 2.8),
    ...pot(18, potHeight),
  ],
};

const hangingFruit = (x: number, y: number): Shape[] => [
  line('stem', `M${x * 0.4} ${y - 4}Q${x} ${y - 6} ${x} ${y - 2.6}`, 1.1),
  filled(
    'fruit',
    `M${x - 3} ${y - 2.4}Q${x} ${y - 4} ${x + 3} ${y - 2.4}Q${x + 2.6} ${y + 2} ${x} ${y + 4}Q${x - 2.6} ${y + 2} ${x - 3} ${y - 2.4}z`,
  ),
];

const strawberry: PlantPicture = {
  breadth: 34,
  height: 23,
  shapes: [
    ...[24, 58, 90, 122, 156].map((way) => line('stem', `M0 0L${stemEnd(way)}`, 1.3)),
    ...[24, 58, 90, 122, 156].flatMap((way) => trefoil(way)),
    ...hangingFruit(-8.5, -4.6),
    ...hangingFruit(7.5, -5),
    ...hangingFruit(0.6, -4.2),
  ],
};

function tipOf(way: number): [number, number] {
  const angle = (way * Math.PI) / 180;
  return [Math.round(Math.cos(angle) * 90) / 10, Math.round(-Math.sin(angle) * 100 - 20) / 10];
}

function stemEnd(way: number): string {
  return tipOf(way).join(' ');
}

function trefoil(way: number): Shape[] {
  const [x, y] = tipOf(way);
  return [
    leaf('shade', x, y, way + 52, 7.4, 5.6),
    leaf('shade', x, y, way - 52, 7.4, 5.6),
    leaf('leaf', x, y, way, 8.6, 6.4),
  ];
}

const podded: PlantPicture = {
  breadth: 30,
  height: 44,
  shapes: [
    stalk(-potHeight, 25),
    ...pairs(-potHeight, 25, 4),
    ...crownTip(-potHeight - 24),
    leaf('fruit', -7, -25, 268, 9, 4.6),
    leaf('fruit', 6.6, -28, 274, 9, 4.6),
    leaf('fruit', 0.6, -21, 270, 8, 4.4),
    ...pot(17, potHeight),
  ],
};

const tree: PlantPicture = {
  breadth: 36,
  height: 54,
  shapes: [
    line('bark', `M0 ${-potHeight}Q-1 -18 0 -27M0 -22L-5 -30M0 -24L5.5 -31`, 2.6),
    filled('shade', 'M-15-31Q-18-38-12.5-43Q-10-52 0-52Q10-52 12.5-43Q18-38 15-31Q10-24 0-26Q-10-24-15-31z'),
    ...[200, 160, 120, 84, 48, 16, 340].map((way) => leaf('leaf', 0, -38, way, 13.4, 7.6)),
    ...[180, 140, 100, 66, 30, 0].map((way) => leaf('shade', 0, -37, way, 7.4, 4.8)),
    round('fruit', -7.4, -34, 3),
    round('fruit', 6.4, -43, 3),
    round('fruit', 5.2, -31.4, 2.8),
    ...pot(20, potHeight),
  ],
};

const resting: PlantPicture = {
  breadth: 20,
  height: 12,
  shapes: [
    filled('soil', 'M-8 0Q0-3.6 8 0z'),
    line('bark', 'M-3-1V-6.5M.4-1.4V-9M3.6-1L4.6-5.6', 1.8),
    leaf('leaf', 0.4, -8, 50, 3.6, 2.2),
  ],
};

const empty: PlantPicture = { breadth: 20, height: 0, shapes: [] };

const byForm: Readonly<Record<Exclude<PlantForm, 'fruiting'>, PlantPicture>> = {
  sown,
  hook,
  twoLeaves,
  blades,
  leafy,
  bush,
  rosette,
  tree,
  resting,
  empty,
};

const inFruit: Readonly<Partial<Record<PlantFamily, PlantPicture>>> = {
  strawberry,
  pepper: podded,
  citrus: tree,
};

/** The drawing of a plant of one family at one form. */
export function plantPicture(form: PlantForm, family: PlantFamily): PlantPicture {
  return form === 'fruiting' ? (inFruit[family] ?? tomato) : byForm[form];
}
