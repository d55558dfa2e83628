import { PNG } from 'pngjs';
import { chartHeight, chartWidth, drawAlertChart, type AlertChartData } from './alert-chart';

const HOUR_MS = 3_600_000;
const flat = (value: number): AlertChartData['points'] =>
  Array.from({ length: 61 }, (_, minute) => [(minute * HOUR_MS) / 60, value, value, value]);
const data = (changes: Partial<AlertChartData>): AlertChartData => ({
  from: 0,
  to: HOUR_MS,
  points: flat(22),
  wanted: [{ from: 0, to: HOUR_MS, low: 18, high: 26 }],
  episode: { from: 0, to: 0 },
  limit: 26,
  ...changes,
});

/** How many pixels have about a colour that stands for something. */
function pixels(png: Buffer | null, [red, green, blue]: readonly [number, number, number]): number {
  const { data: bytes } = PNG.sync.read(png ?? Buffer.alloc(0));
  let found = 0;
  for (let at = 0; at < bytes.length; at += 4) {
    const off = [red, green, blue].map((value, channel) => Math.abs((bytes[at + channel] ?? 0) - value));
    if (Math.max(...off) < 12 && (bytes[at + 3] ?? 0) > 200) found += 1;
  }
  return found;
}
const ember = [205, 88, 58] as const;
const frost = [74, 139, 190] as const;

describe('the chart of an alert', () => {
  it('is a PNG of its size without a ground', () => {
    const png = PNG.sync.read(drawAlertChart(data({ wanted: [] })) ?? Buffer.alloc(0));
    expect([png.width, png.height]).toEqual([chartWidth, chartHeight]);
    expect(png.data[3]).toBe(0);
  });

  it.each([
    ['inside the range', 22, 0, 0],
    ['above it', 28, 1, 0],
    ['below it', 15, 0, 1],
  ])('marks a line %s by its colour', (_where, value, isEmber, isFrost) => {
    const png = drawAlertChart(data({ points: flat(value) }));
    expect(Math.sign(pixels(png, ember))).toBe(isEmber);
    expect(Math.sign(pixels(png, frost))).toBe(isFrost);
  });

  it('breaks the line where nothing was measured', () => {
    const whole = drawAlertChart(data({ points: flat(28) }));
    const broken = drawAlertChart(
      data({
        points: flat(28).map((point, index) => (index % 2 === 0 ? point : [point[0], null, null, null])),
      }),
    );
    expect(pixels(broken, ember)).toBeLessThan(pixels(whole, ember) / 2);
  });

  it('draws one value that never changes, and nothing without readings', () => {
    expect(drawAlertChart(data({ points: flat(22), wanted: [], limit: null }))).not.toBeNull();
    expect(drawAlertChart(data({ points: [] }))).toBeNull();
    expect(drawAlertChart(data({ points: [[0, null, null, null]] }))).toBeNull();
  });
});
