import type {
  CustomSeriesOption,
  CustomSeriesRenderItemAPI,
  CustomSeriesRenderItemParams,
  CustomSeriesRenderItemReturn,
} from 'echarts';
import type { ChartLimit, ChartMark, ChartPoint, ChartSpan, WantedSpan } from './chart-data';

interface Plot {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

const lampThickness = 4;
const lampLift = 9;
const markRadius = 3.5;

// Behind and around the lines; only the lines themselves answer to the pointer.
const behind = { type: 'custom', silent: true, animation: false, tooltip: { show: false } } as const;

function plotOf(params: CustomSeriesRenderItemParams): Plot {
  // A grid's coordinate system carries its own rectangle, which the general type leaves open.
  return params.coordSys as unknown as Plot;
}

/** The span between two horizontal positions, cut to the plot; null outside it. */
function within(plot: Plot, from: number, to: number): { x: number; width: number } | null {
  const left = Math.max(from, plot.x);
  const right = Math.min(to, plot.x + plot.width);
  return right > left ? { x: left, width: right - left } : null;
}

function horizontal(api: CustomSeriesRenderItemAPI, dimension: number): number {
  return api.coord([api.value(dimension), 0])[0] ?? 0;
}

/** The wanted range as a band that steps; an open end reaches the edge of the plot. */
export function wantedBand(wanted: readonly WantedSpan[], fill: string): CustomSeriesOption {
  return {
    ...behind,
    id: 'wanted',
    z: 1,
    encode: { x: [0, 1], y: [2, 3] },
    data: wanted.map(({ from, to, low, high }) => [from, to, low ?? NaN, high ?? NaN]),
    renderItem: (params, api) => {
      const plot = plotOf(params);
      const across = within(plot, horizontal(api, 0), horizontal(api, 1));
      if (across === null) return null;
      const edge = (dimension: number, open: number): number => {
        const limit = Number(api.value(dimension));
        if (Number.isNaN(limit)) return open;
        const y = api.coord([api.value(0), limit])[1] ?? open;
        return Math.min(plot.y + plot.height, Math.max(plot.y, y));
      };
      const [top, bottom] = [edge(3, plot.y), edge(2, plot.y + plot.height)];
      return rectangle({ ...across, y: top, height: Math.max(0, bottom - top) }, fill);
    },
  };
}

/** Darkens the plot over some spans. */
export function nightShade(nights: readonly ChartSpan[], fill: string): CustomSeriesOption {
  return {
    ...behind,
    id: 'nights',
    z: 0,
    encode: { x: [0, 1] },
    data: nights.map(({ from, to }) => [from, to]),
    renderItem: (params, api) => {
      const plot = plotOf(params);
      const across = within(plot, horizontal(api, 0), horizontal(api, 1));
      return across && rectangle({ ...across, y: plot.y, height: plot.height }, fill);
    },
  };
}

/** When lamps were on: a line over the plot. */
export function lampLine(lamps: readonly ChartSpan[], fill: string): CustomSeriesOption {
  return {
    ...behind,
    id: 'lamps',
    z: 3,
    clip: false,
    encode: { x: [0, 1] },
    data: lamps.map(({ from, to }) => [from, to]),
    renderItem: (params, api) => {
      const plot = plotOf(params);
      const across = within(plot, horizontal(api, 0), horizontal(api, 1));
      return across && rectangle({ ...across, y: plot.y - lampLift, height: lampThickness, r: 2 }, fill);
    },
  };
}

/** Between the lowest and highest value of what each point stands for. */
export function envelope(
  id: string,
  axis: number,
  points: readonly ChartPoint[],
  fill: string,
): CustomSeriesOption {
  const pieces = points.slice(1).flatMap((next, index) => {
    const [at, mean, low, high] = points[index] ?? [NaN, null, null, null];
    const [nextAt, nextMean, nextLow, nextHigh] = next;
    const isDrawn = mean !== null && nextMean !== null && (low !== high || nextLow !== nextHigh);
    return isDrawn ? [[at, nextAt, low, high, nextLow, nextHigh]] : [];
  });
  return {
    ...behind,
    id,
    z: 2,
    yAxisIndex: axis,
    clip: true,
    encode: { x: [0, 1], y: [2, 3, 4, 5] },
    data: pieces,
    renderItem: (_params, api) => {
      const corner = (at: number, value: number): number[] => api.coord([api.value(at), api.value(value)]);
      return {
        type: 'polygon',
        shape: { points: [corner(0, 2), corner(0, 3), corner(1, 5), corner(1, 4)] },
        style: { fill, opacity: 0.16 },
      };
    },
  };
}

/** A dotted upright with a ring at its foot for each mark; what it means stands in words under the chart. */
export function markLines(marks: readonly ChartMark[], stroke: string, fill: string): CustomSeriesOption {
  return {
    ...behind,
    id: 'marks',
    z: 4,
    clip: false,
    encode: { x: [0] },
    data: marks.map(({ at }) => [at]),
    renderItem: (params, api) => {
      const plot = plotOf(params);
      const x = horizontal(api, 0);
      if (x < plot.x || x > plot.x + plot.width) return null;
      const foot = plot.y + plot.height;
      return {
        type: 'group',
        children: [
          {
            type: 'line',
            shape: { x1: x, x2: x, y1: plot.y, y2: foot - markRadius },
            style: { stroke, lineWidth: 1.2, lineDash: [2, 3] },
          },
          {
            type: 'circle',
            shape: { cx: x, cy: foot, r: markRadius },
            style: { stroke, fill, lineWidth: 1.6 },
          },
        ],
      };
    },
  };
}

/** A dashed level where a limit was passed; the plot reaches as far as it does. */
export function limitLevel(limit: ChartLimit, stroke: string): CustomSeriesOption {
  return {
    ...behind,
    id: 'limit',
    z: 4,
    encode: { x: [0, 1], y: [2] },
    data: [[limit.from, limit.to, limit.value]],
    renderItem: (params, api) => {
      const across = within(plotOf(params), horizontal(api, 0), horizontal(api, 1));
      if (across === null) return null;
      const y = api.coord([api.value(0), api.value(2)])[1] ?? 0;
      return {
        type: 'line',
        shape: { x1: across.x, x2: across.x + across.width, y1: y, y2: y },
        style: { stroke, lineWidth: 1.6, lineDash: [6, 4] },
      };
    },
  };
}

function rectangle(
  shape: { x: number; y: number; width: number; height: number; r?: number },
  fill: string,
): CustomSeriesRenderItemReturn {
  return { type: 'rect', shape, style: { fill } };
}
