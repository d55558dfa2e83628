import type { ChartPoint } from '@shared/contracts/series';
import { PixelCanvas, type Ink, type Point } from './pixel-canvas';

/** A stretch with one wanted range [ms, stored unit]. */
export interface WantedStretch {
  readonly from: number;
  readonly to: number;
  readonly low: number | null;
  readonly high: number | null;
}

/** What the chart of an episode shows. */
export interface AlertChartData {
  /** Span of the chart [ms]. */
  readonly from: number;
  readonly to: number;
  /** In order; null values break the line. */
  readonly points: readonly ChartPoint[];
  readonly wanted: readonly WantedStretch[];
  /** The episode so far [ms]. */
  readonly episode: { readonly from: number; readonly to: number };
  /** The limit that was passed, drawn where no range is wanted. */
  readonly limit: number | null;
}

/** Shown at half this size, so that it is sharp on a phone. */
export const chartWidth = 1040;
export const chartHeight = 300;

// Middle tones that stand out on paper as on a dark page: the picture has no ground of its own.
const line: Ink = { red: 146, green: 130, blue: 112, alpha: 1 };
const rule: Ink = { ...line, alpha: 0.45 };
const band: Ink = { red: 92, green: 158, blue: 130, alpha: 0.3 };
const span: Ink = { red: 235, green: 169, blue: 33, alpha: 0.16 };
const ember: Ink = { red: 205, green: 88, blue: 58, alpha: 1 };
const frost: Ink = { red: 74, green: 139, blue: 190, alpha: 1 };

const MARGIN = 14;

/**
 * Draws an episode: the measured line, the wanted band behind it, heavier in ember above and in frost below it, and the
 * span of the episode.
 *
 * @param data - At least two instants wide.
 * @returns A PNG without a ground, {@link chartWidth} by {@link chartHeight}; null when there is no reading to draw.
 */
export function drawAlertChart(data: AlertChartData): Buffer | null {
  const values = data.points.flatMap(([, value]) => (value === null ? [] : [value]));
  if (values.length === 0) return null;
  const canvas = new PixelCanvas(chartWidth, chartHeight);
  const { x, y } = scales(data, values);
  const bottom = chartHeight - MARGIN;
  canvas.fill(x(data.episode.from), MARGIN / 2, x(data.episode.to), bottom, span);
  for (const { from, to, low, high } of data.wanted) {
    if (low === null && high === null) continue;
    canvas.fill(x(from), high === null ? 0 : y(high), x(to), low === null ? bottom : y(low), band);
  }
  if (data.wanted.length === 0 && data.limit !== null) {
    const [left, right, height] = [x(data.from), x(data.to), y(data.limit)];
    canvas.stroke(
      [
        [
          [left, height],
          [right, height],
        ],
      ],
      3,
      rule,
    );
  }
  canvas.fill(0, bottom, chartWidth, bottom + 2, rule);
  const drawn = segments(data.points, data.wanted, x, y);
  canvas.stroke(drawn.inside, 6, line);
  canvas.stroke(drawn.above, 8, ember);
  canvas.stroke(drawn.below, 8, frost);
  return canvas.toPng();
}

interface Scales {
  readonly x: (at: number) => number;
  readonly y: (value: number) => number;
}

/** Fits the readings and the ends of the wanted ranges. */
function scales({ from, to, wanted, limit }: AlertChartData, values: readonly number[]): Scales {
  const ends = wanted.flatMap(({ low, high }) => [low, high]).filter((end) => end !== null);
  const shown = [...values, ...ends, ...(limit === null ? [] : [limit])];
  const [least, most] = [Math.min(...shown), Math.max(...shown)];
  const room = most === least ? 1 : (most - least) * 0.08;
  const [low, high] = [least - room, most + room];
  return {
    x: (at) => ((Math.max(from, Math.min(to, at)) - from) / (to - from)) * chartWidth,
    y: (value) => MARGIN + ((high - value) / (high - low)) * (chartHeight - 2 * MARGIN),
  };
}

type Side = 'inside' | 'above' | 'below';

/** Pairs of neighbours, by where the later one lies. */
function segments(
  points: readonly ChartPoint[],
  wanted: readonly WantedStretch[],
  x: Scales['x'],
  y: Scales['y'],
): Readonly<Record<Side, Point[][]>> {
  const drawn: Record<Side, Point[][]> = { inside: [], above: [], below: [] };
  let before: Point | null = null;
  for (const [at, value] of points) {
    if (value === null) {
      before = null;
      continue;
    }
    const here: Point = [x(at), y(value)];
    drawn[sideOf(at, value, wanted)].push(before === null ? [here] : [before, here]);
    before = here;
  }
  return drawn;
}

function sideOf(at: number, value: number, wanted: readonly WantedStretch[]): Side {
  const { low = null, high = null } = wanted.find(({ from, to }) => at >= from && at < to) ?? {};
  if (high !== null && value > high) return 'above';
  return low !== null && value < low ? 'below' : 'inside';
}
