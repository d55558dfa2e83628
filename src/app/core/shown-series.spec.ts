import type { ChartPoint, Series } from '@shared/contracts/series';
import { inventedId } from './testing/board-builder';
import { hasReadings, shownLines, shownWanted, withLive, type LiveValue } from './shown-series';

const start = Date.parse('2026-12-01T14:00:00Z');
const single = (minutes: number, value: number): ChartPoint => [
  start + minutes * 60_000,
  value,
  value,
  value,
];
const live = (minutes: number, value: number): LiveValue => ({
  at: new Date(start + minutes * 60_000).toISOString(),
  value,
  expectedIntervalS: 60,
});

function series(changes: Partial<Series> = {}): Series {
  return {
    quantity: 'airTemperature',
    lines: [
      {
        sensorId: inventedId(700),
        name: 'Rack A node',
        resolution: 'reading',
        points: [single(0, 20), single(1, 21)],
      },
    ],
    wanted: [],
    ...changes,
  };
}
const values = (of: Series, told: LiveValue[]): (number | null)[][] =>
  shownLines(of, told, '°C').map(({ points }) => points.map(([, mean]) => mean));

describe('the shown lines of a series', () => {
  it('are in the reader’s unit, gaps left open', () => {
    const [line] = shownLines(
      series({
        lines: [
          {
            sensorId: null,
            name: 'x',
            resolution: 'hour',
            points: [
              [start, 20, 15, 25],
              [start + 1, null, null, null],
            ],
          },
        ],
      }),
      [],
      '°F',
    );
    expect(line).toMatchObject({ unit: '°F', decimals: 1 });
    expect(line?.points).toEqual([
      [start, 68, 59, 77],
      [start + 1, null, null, null],
    ]);
  });

  it('go on with what came live, once', () => {
    expect(values(series(), [live(1, 99), live(2, 22), live(3, 23)])).toEqual([[20, 21, 22, 23]]);
  });

  it('show a gap before a live reading that came late', () => {
    expect(values(series(), [live(4, 22)])).toEqual([[20, 21, null, 22]]);
  });

  it('go on only on the newest line: an older sensor was moved away', () => {
    const [line] = series().lines;
    const moved = { ...line!, points: [single(-20, 18)] };
    expect(values(series({ lines: [line!, moved] }), [live(2, 22)])).toEqual([[20, 21, 22], [18]]);
  });

  it('of hourly means stay as they were fetched', () => {
    const [line] = series().lines;
    expect(values(series({ lines: [{ ...line!, resolution: 'hour' }] }), [live(2, 22)])).toEqual([[20, 21]]);
  });
});

describe('the shown wanted range', () => {
  it('steps in the reader’s unit and leaves out times without one', () => {
    const at = (hour: number): string => new Date(start + hour * 3_600_000).toISOString();
    const wanted = [
      { from: at(0), to: at(1), low: 20, high: null },
      { from: at(1), to: at(2), low: null, high: null },
    ];
    expect(shownWanted(series({ wanted }), '°F')).toEqual([
      { from: start, to: start + 3_600_000, low: 68, high: null },
    ]);
  });
});

describe('a series', () => {
  it('of gaps alone has no readings', () => {
    const [line] = series().lines;
    expect(hasReadings(series())).toBe(true);
    expect(hasReadings(series({ lines: [{ ...line!, points: [[start, null, null, null]] }] }))).toBe(false);
  });

  it('takes a live value only when it is newer', () => {
    const first = withLive([], live(1, 20));
    expect(withLive(first, live(1, 20))).toBe(first);
    expect(withLive(first, null)).toBe(first);
    expect(withLive(first, live(2, 21))).toHaveLength(2);
  });
});
