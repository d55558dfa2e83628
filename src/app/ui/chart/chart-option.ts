import type {
  CustomSeriesOption,
  EChartsOption,
  LineSeriesOption,
  TooltipComponentOption,
  YAXisComponentOption,
} from 'echarts';
import { formatNumber, formatValue } from '@shared/format/numbers';
import { formatDayAndTime } from '@shared/format/room-time';
import type { ChartColours } from './chart-colours';
import type { ChartLimit, ChartLine, ChartMark, ChartSpan, WantedSpan } from './chart-data';
import { envelope, lampLine, limitLevel, markLines, nightShade, wantedBand } from './chart-layers';
import { outsideSegments, type PenPoint } from './outside-segments';
import { roomTicks, tickLabel } from './room-ticks';

/** Everything that a chart draws. */
export interface ChartContent {
  readonly lines: readonly ChartLine[];
  readonly wanted: readonly WantedSpan[];
  readonly lamps: readonly ChartSpan[];
  readonly nights: readonly ChartSpan[];
  readonly marks: readonly ChartMark[];
  /** A limit that was passed; null where there is none to show. */
  readonly limit: ChartLimit | null;
  /** The whole span that can be shown. */
  readonly span: ChartSpan;
  /** IANA name of the room's time zone. */
  readonly zone: string;
}

/** How it is drawn. */
export interface ChartManner {
  readonly colours: ChartColours;
  /** Breadth of the chart [px], for the number of its ticks. */
  readonly breadth: number;
  readonly isStill: boolean;
}

const textFont = "'Atkinson Hyperlegible Next Variable', system-ui, sans-serif";
const tickBreadth = 80;
const dashes: readonly LineSeriesOption['lineStyle'][] = [
  { type: 'solid' },
  { type: [7, 4] },
  { type: [2, 3] },
  { type: [9, 3, 2, 3] },
];

/** What ECharts draws for a chart, zoomed to a span. */
export function chartOption(content: ChartContent, shown: ChartSpan, manner: ChartManner): EChartsOption {
  const { colours } = manner;
  const units = unitsOf(content.lines);
  return {
    animation: !manner.isStill,
    animationDuration: 250,
    textStyle: { fontFamily: textFont, color: colours.secondInk },
    grid: { left: 52, right: units.length > 1 ? 52 : 14, top: 18, bottom: 28 },
    xAxis: {
      type: 'value',
      min: content.span.from,
      max: content.span.to,
      axisLine: { onZero: false, lineStyle: { color: colours.rule } },
      splitLine: { show: false },
      axisPointer: { show: true, label: { show: false }, lineStyle: { color: colours.edge, type: 'dashed' } },
      ...roomAxis(content.zone, shown, manner),
    },
    yAxis: units.map((unit, index) => valueAxis(unit, index, colours)),
    dataZoom: [
      {
        type: 'inside',
        filterMode: 'none',
        startValue: shown.from,
        endValue: shown.to,
        // The bare wheel belongs to the page.
        zoomOnMouseWheel: 'ctrl',
        preventDefaultMouseMove: false,
      },
    ],
    tooltip: tooltip(content, colours),
    series: [
      nightShade(content.nights, colours.sunk),
      wantedBand(content.wanted, colours.leekTint),
      lampLine(content.lamps, colours.lamp),
      markLines(content.marks, colours.frost, colours.sheet),
      ...limitSeries(content.limit, colours),
      ...content.lines.flatMap((line, index) => lineSeries(line, index, units.indexOf(line.unit), colours)),
      ...outsideSeries(content, colours),
    ],
  };
}

/** What changes when a chart is zoomed: the ticks, so that they stay round in the room's time. */
export function zoomOption(zone: string, shown: ChartSpan, manner: ChartManner): EChartsOption {
  return { xAxis: roomAxis(zone, shown, manner) };
}

function roomAxis(
  zone: string,
  shown: ChartSpan,
  { breadth, colours }: ChartManner,
): {
  axisTick: object;
  axisLabel: object;
} {
  const customValues = [...roomTicks(shown, Math.max(2, Math.floor(breadth / tickBreadth)), zone)];
  return {
    axisTick: { customValues, lineStyle: { color: colours.edge } },
    axisLabel: {
      customValues,
      color: colours.secondInk,
      hideOverlap: true,
      showMinLabel: true,
      showMaxLabel: true,
      formatter: (at: number) => tickLabel(at, shown, zone),
    },
  };
}

function unitsOf(lines: readonly ChartLine[]): readonly string[] {
  const units = [...new Set(lines.map(({ unit }) => unit))];
  return units.length === 0 ? [''] : units;
}

function valueAxis(unit: string, index: number, colours: ChartColours): YAXisComponentOption {
  return {
    type: 'value',
    scale: true,
    splitNumber: 3,
    position: index === 0 ? 'left' : 'right',
    axisLine: { show: false },
    axisTick: { show: false },
    axisLabel: { color: colours.secondInk, formatter: (value: number) => axisNumber(value) },
    splitLine: { show: index === 0, lineStyle: { color: colours.rule, width: 0.8 } },
    name: index === 0 ? undefined : unit,
    nameTextStyle: { color: colours.secondInk },
  };
}

function axisNumber(value: number): string {
  const decimals = [0, 1, 2].find((digits) => Math.abs(value - Number(value.toFixed(digits))) < 1e-9);
  return formatNumber(value, decimals ?? 3);
}

function lineColour(index: number, colours: ChartColours): string {
  return [colours.ink, colours.leek, colours.secondInk, colours.edge][index % 4] ?? colours.ink;
}

function lineSeries(
  line: ChartLine,
  index: number,
  axis: number,
  colours: ChartColours,
): (LineSeriesOption | CustomSeriesOption)[] {
  const color = lineColour(index, colours);
  const drawn: LineSeriesOption = {
    ...pen(
      `line-${index}`,
      line.points.map(([at, mean]) => [at, mean]),
    ),
    name: line.name,
    yAxisIndex: axis,
    z: 5,
    silent: false,
    tooltip: { show: true },
    color,
    lineStyle: { ...dashes[index % dashes.length], width: 1.6, color },
    showSymbol: isolated(line),
  };
  return [envelope(`envelope-${index}`, axis, line.points, color), drawn];
}

/** A single point between gaps has no line, so it needs a dot. */
function isolated({ points }: ChartLine): boolean {
  return points.length < 3;
}

function outsideSeries({ lines, wanted }: ChartContent, colours: ChartColours): LineSeriesOption[] {
  const [judged] = lines;
  if (judged === undefined) return [];
  const { above, below } = outsideSegments(judged.points, wanted);
  return [
    { ...pen('above', above), lineStyle: { width: 3, color: colours.ember } },
    { ...pen('below', below), lineStyle: { width: 3, color: colours.frost } },
  ];
}

function limitSeries(limit: ChartLimit | null, { ember, frost }: ChartColours): CustomSeriesOption[] {
  return limit === null ? [] : [limitLevel(limit, limit.isUpper ? ember : frost)];
}

function pen(id: string, data: readonly PenPoint[]): LineSeriesOption {
  return {
    id,
    type: 'line',
    data: [...data],
    connectNulls: false,
    showSymbol: false,
    silent: true,
    tooltip: { show: false },
    z: 6,
    emphasis: { disabled: true },
  };
}

function tooltip({ lines, zone }: ChartContent, colours: ChartColours): TooltipComponentOption {
  return {
    trigger: 'axis',
    confine: true,
    transitionDuration: 0,
    backgroundColor: colours.sheet,
    borderColor: colours.edge,
    textStyle: { color: colours.ink, fontSize: 13 },
    formatter: (found) => {
      const points = (Array.isArray(found) ? found : [found]).flatMap(({ seriesId, value }) => {
        const line = lines[Number(/^line-(\d+)$/.exec(seriesId ?? '')?.[1])];
        const [at, mean] = value as PenPoint;
        return line === undefined ? [] : [{ line, at, mean }];
      });
      const at = points[0]?.at;
      // Elements and not markup: a sensor's name is somebody's words.
      return at === undefined ? '' : tooltipElement(formatDayAndTime(at, zone), points);
    },
  };
}

function tooltipElement(
  when: string,
  points: readonly { line: ChartLine; mean: number | null }[],
): HTMLElement {
  const rows = points.map(({ line, mean }) => {
    const row = document.createElement('div');
    const value = document.createElement('b');
    value.textContent = formatValue(mean, line.unit, line.decimals);
    row.append(`${line.name} `, value);
    return row;
  });
  const element = document.createElement('div');
  element.append(when, ...rows);
  return element;
}
