import { typedBand } from './typed-band';

const hour = 3_600_000;
const instant = (hours: number): string => new Date(hours * hour).toISOString();
const span = { from: 0, to: 24 * hour };
const on = { low: 20, high: 26 };
const off = { low: 16, high: null };

describe('a range while it is typed', () => {
  it('steps as the lamps were planned, from one end of the chart to the other', () => {
    const lamps = [{ from: instant(6), to: instant(22) }];
    expect(typedBand({ lampsOn: on, lampsOff: off }, lamps, span)).toEqual([
      { from: 0, to: 6 * hour, ...off },
      { from: 6 * hour, to: 22 * hour, ...on },
      { from: 22 * hour, to: 24 * hour, ...off },
    ]);
  });

  it('is cut where lamps were on before and are after', () => {
    const lamps = [
      { from: instant(-2), to: instant(4) },
      { from: instant(20), to: instant(30) },
    ];
    expect(typedBand({ lampsOn: on, lampsOff: off }, lamps, span).map(({ from, to }) => [from, to])).toEqual([
      [0, 4 * hour],
      [4 * hour, 20 * hour],
      [20 * hour, 24 * hour],
    ]);
  });

  it('has no span where nothing is wanted, zero being something', () => {
    const free = { low: null, high: null };
    expect(typedBand({ lampsOn: free, lampsOff: free }, [], span)).toEqual([]);
    expect(typedBand({ lampsOn: free, lampsOff: { low: 0, high: null } }, [], span)).toHaveLength(1);
  });
});
