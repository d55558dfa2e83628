import { grossRangeFlags, spikeFlags } from '@shared/series/qartod-flags';

// Vectors from the tests of ioos_qc, the reference implementation of QARTOD by US IOOS.
describe('grossRangeFlags', () => {
  it('reproduces the published vector for a sensor range of 10–50 and a user range of 20–40', () => {
    const values = [5, 10, 15, 20, 25, 30, 35, 40, 45, 51];

    expect(grossRangeFlags(values, { sensor: [10, 50], user: [20, 40] })).toEqual([
      4, 3, 3, 1, 1, 1, 1, 1, 3, 4,
    ]);
  });

  it('fails a value that is not a number', () => {
    expect(grossRangeFlags([Number.NaN], { sensor: [10, 50], user: [20, 40] })).toEqual([4]);
  });
});

describe('spikeFlags', () => {
  it('reproduces the published vector for thresholds 25 and 50', () => {
    const values = [10, 12, 999.99, 13, 15, 40, 9, 9];

    expect(spikeFlags(values, { suspect: 25, fail: 50 })).toEqual([2, 4, 4, 4, 1, 3, 1, 2]);
  });

  it('passes a distance of just the threshold', () => {
    expect(spikeFlags([0, 25, 0], { suspect: 25, fail: 50 })).toEqual([2, 1, 2]);
    expect(spikeFlags([0, 50, 0], { suspect: 25, fail: 50 })).toEqual([2, 3, 2]);
  });

  it.each([[[]], [[1]], [[1, 2]]])('evaluates nothing in %j', (values) => {
    expect(spikeFlags(values, { suspect: 25, fail: 50 })).toEqual(values.map(() => 2));
  });
});
