/** How a shape is filled or drawn; each crop family gives these its own colours. */
export type Paint = 'leaf' | 'shade' | 'stem' | 'fruit' | 'seed' | 'bark' | 'pot' | 'soil' | 'vein';

/** One path of a drawing. The ground is y = 0 and up is negative; a line has a width, a filled shape has none. */
export interface Shape {
  readonly paint: Paint;
  readonly d: string;
  readonly width: number | null;
}

const rounded = (value: number): number => Math.round(value * 10) / 10;
const at = (x: number, y: number): string => `${rounded(x)} ${rounded(y)}`;

/** A filled outline. */
export function filled(paint: Paint, d: string): Shape {
  return { paint, d, width: null };
}

/** A drawn line. */
export function line(paint: Paint, d: string, width: number): Shape {
  return { paint, d, width };
}

/** A round fruit or seed. */
export function round(paint: Paint, x: number, y: number, radius: number): Shape {
  const diameter = rounded(radius * 2);
  const arc = `a${radius} ${radius} 0 1 1`;
  return filled(paint, `M${at(x - radius, y)}${arc} ${diameter} 0${arc} ${-diameter} 0z`);
}

/**
 * A pointed leaf that grows from a point.
 *
 * @param degrees - Direction of growth: 0 to the right, 90 straight up.
 * @param length - From base to tip.
 * @param breadth - At its widest, about two fifths of the way.
 */
export function leaf(
  paint: Paint,
  x: number,
  y: number,
  degrees: number,
  length: number,
  breadth: number,
): Shape {
  const angle = (degrees * Math.PI) / 180;
  const [alongX, alongY] = [Math.cos(angle), -Math.sin(angle)];
  const point = (along: number, aside: number): string =>
    at(x + alongX * along - alongY * aside, y + alongY * along + alongX * aside);
  const side = (sign: number): string =>
    `${point(length * 0.22, sign * breadth * 0.62)} ${point(length * 0.62, sign * breadth * 0.6)}`;
  return filled(
    paint,
    `M${at(x, y)}C${side(1)} ${point(length, 0)}C${point(length * 0.62, -breadth * 0.6)} ${point(length * 0.22, -breadth * 0.62)} ${at(x, y)}z`,
  );
}

/** A long blade that rises and bends over to one side, tapering to its tip. */
export function blade(paint: Paint, x: number, height: number, lean: number, breadth: number): Shape {
  const half = breadth / 2;
  return filled(
    paint,
    `M${at(x - half, 0)}Q${at(x - half * 0.6 + lean * 0.1, -height * 0.62)} ${at(x + lean, -height)}` +
      `Q${at(x + half * 1.5 + lean * 0.25, -height * 0.55)} ${at(x + half, 0)}z`,
  );
}

/** A pot that stands on the board. @param height - Up to its rim. */
export function pot(breadth: number, height: number): readonly Shape[] {
  const [rim, foot] = [breadth / 2, breadth * 0.36];
  return [
    filled('pot', `M${at(-rim, -height)}L${at(-foot, 0)}H${rounded(foot)}L${at(rim, -height)}z`),
    filled(
      'soil',
      `M${at(-rim - 0.8, -height - 2.2)}H${rounded(rim + 0.8)}V${rounded(-height + 0.6)}H${rounded(-rim - 0.8)}z`,
    ),
  ];
}
