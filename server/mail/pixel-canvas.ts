import { constants } from 'node:zlib';
import { PNG } from 'pngjs';

/** A colour with its opacity. */
export interface Ink {
  readonly red: number;
  readonly green: number;
  readonly blue: number;
  /** 0 to 1. */
  readonly alpha: number;
}

/** A place on a {@link PixelCanvas}, in pixels from the top left. */
export type Point = readonly [x: number, y: number];

/** Just enough of a canvas for a line chart: rectangles and smooth lines over nothing, saved as PNG. */
export class PixelCanvas {
  private readonly png: PNG;

  constructor(
    readonly width: number,
    readonly height: number,
  ) {
    this.png = new PNG({ width, height });
  }

  /** Fills a rectangle, cut to whole pixels. */
  fill(left: number, top: number, right: number, bottom: number, ink: Ink): void {
    const [fromX, toX] = [clamp(left, this.width), clamp(right, this.width)];
    const [fromY, toY] = [clamp(top, this.height), clamp(bottom, this.height)];
    for (let y = fromY; y < toY; y += 1) for (let x = fromX; x < toX; x += 1) this.blend(x, y, ink, 1);
  }

  /**
   * Draws lines through points, with round joints and ends. All that is drawn in one call is as one stroke: where it
   * crosses itself it gets no darker.
   */
  stroke(lines: readonly (readonly Point[])[], thickness: number, ink: Ink): void {
    const coverage = new Float32Array(this.width * this.height);
    for (const points of lines) {
      points.forEach((end, index) => {
        this.cover(coverage, points[Math.max(0, index - 1)] ?? end, end, thickness / 2);
      });
    }
    coverage.forEach((share, index) => {
      if (share > 0) this.blend(index % this.width, Math.floor(index / this.width), ink, share);
    });
  }

  /** The picture as a PNG file. */
  toPng(): Buffer {
    // Flat colours need no filter, and finding the best one for each row would cost more than all the drawing.
    return PNG.sync.write(this.png, { filterType: 0, deflateStrategy: constants.Z_DEFAULT_STRATEGY });
  }

  /** Keeps for each pixel near a segment how much of it the segment covers, by the distance of its middle. */
  private cover(coverage: Float32Array, from: Point, to: Point, radius: number): void {
    const reach = radius + 1;
    const [fromX, toX] = [Math.min(from[0], to[0]) - reach, Math.max(from[0], to[0]) + reach];
    const [fromY, toY] = [Math.min(from[1], to[1]) - reach, Math.max(from[1], to[1]) + reach];
    for (let y = clamp(fromY, this.height); y < clamp(toY, this.height); y += 1) {
      for (let x = clamp(fromX, this.width); x < clamp(toX, this.width); x += 1) {
        const share = Math.min(1, radius + 0.5 - distanceToSegment([x + 0.5, y + 0.5], from, to));
        const index = y * this.width + x;
        if (share > (coverage[index] ?? 0)) coverage[index] = share;
      }
    }
  }

  /** Lays ink over a pixel: "source over" of straight alpha. */
  private blend(x: number, y: number, ink: Ink, share: number): void {
    const { data } = this.png;
    const at = (y * this.width + x) * 4;
    const above = ink.alpha * share;
    const below = ((data[at + 3] ?? 0) / 255) * (1 - above);
    const alpha = above + below;
    data[at] = (ink.red * above + (data[at] ?? 0) * below) / alpha + 0.5;
    data[at + 1] = (ink.green * above + (data[at + 1] ?? 0) * below) / alpha + 0.5;
    data[at + 2] = (ink.blue * above + (data[at + 2] ?? 0) * below) / alpha + 0.5;
    data[at + 3] = alpha * 255 + 0.5;
  }
}

function clamp(value: number, most: number): number {
  return Math.max(0, Math.min(most, Math.round(value)));
}

function distanceToSegment([x, y]: Point, [fromX, fromY]: Point, [toX, toY]: Point): number {
  const [dx, dy] = [toX - fromX, toY - fromY];
  const squared = dx * dx + dy * dy;
  const along = squared === 0 ? 0 : Math.max(0, Math.min(1, ((x - fromX) * dx + (y - fromY) * dy) / squared));
  return Math.hypot(x - fromX - along * dx, y - fromY - along * dy);
}
