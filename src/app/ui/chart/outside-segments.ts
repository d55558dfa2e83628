import { standing } from '@shared/format/standing';
import type { ChartPoint, WantedSpan } from './chart-data';

/** A line's points for drawing; a null value lifts the pen. */
export type PenPoint = [at: number, value: number | null];

/** The parts of a line that lie outside the wanted range. */
export interface OutsideSegments {
  readonly above: readonly PenPoint[];
  readonly below: readonly PenPoint[];
}

interface End {
  readonly at: number;
  readonly value: number;
}

/**
 * Cuts out of a line what lies above and below the wanted range, exactly where it crosses a limit or the range steps.
 *
 * @param points - In order of time; between two points the line is straight, a null breaks it.
 * @param wanted - In order of time, not overlapping.
 */
export function outsideSegments(
  points: readonly ChartPoint[],
  wanted: readonly WantedSpan[],
): OutsideSegments {
  const above: PenPoint[] = [];
  const below: PenPoint[] = [];
  let first = 0;
  points.slice(1).forEach((next, index) => {
    const start = end(points[index]);
    const stop = end(next);
    if (start === null || stop === null) return;
    while ((wanted[first]?.to ?? Infinity) <= start.at) first += 1;
    for (let w = first; w < wanted.length; w += 1) {
      const range = wanted[w];
      if (range === undefined || range.from >= stop.at) break;
      cut(start, stop, range, above, below);
    }
  });
  return { above, below };
}

function end(point: ChartPoint | undefined): End | null {
  return point === undefined || point[1] === null ? null : { at: point[0], value: point[1] };
}

function cut(start: End, stop: End, range: WantedSpan, above: PenPoint[], below: PenPoint[]): void {
  const value = (at: number): number =>
    start.value + ((stop.value - start.value) * (at - start.at)) / (stop.at - start.at);
  const from = Math.max(start.at, range.from);
  const to = Math.min(stop.at, range.to);
  const crossings = [range.low, range.high]
    .filter((limit) => limit !== null)
    .map((limit) => start.at + ((limit - start.value) / (stop.value - start.value)) * (stop.at - start.at))
    .filter((at) => at > from && at < to)
    .sort((a, b) => a - b);
  const ends = [from, ...crossings, to];
  ends.slice(1).forEach((pieceEnd, index) => {
    const pieceStart = ends[index] ?? from;
    const { side } = standing(value((pieceStart + pieceEnd) / 2), range);
    if (side === 'inside') return;
    draw(side === 'above' ? above : below, [pieceStart, value(pieceStart)], [pieceEnd, value(pieceEnd)]);
  });
}

function draw(pen: PenPoint[], start: [number, number], stop: [number, number]): void {
  const last = pen.at(-1);
  const joins =
    last !== undefined && last[0] === start[0] && last[1] !== null && Math.abs(last[1] - start[1]) < 1e-9;
  if (!joins) {
    if (last !== undefined) pen.push([last[0], null]);
    pen.push(start);
  }
  pen.push(stop);
}
