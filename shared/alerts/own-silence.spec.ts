import { longestOwnSilenceMs } from './own-silence';

describe('silence of a sensor’s own', () => {
  it.each([
    ['all of it while its device speaks', [], 100],
    ['none of it while its device is silent too', [{ from: 0, to: 100 }], 0],
    ['what comes before and after the device’s', [{ from: 10, to: 70 }], 30],
    [
      'the longest stretch between the device’s',
      [
        { from: 10, to: 20 },
        { from: 75, to: 200 },
      ],
      55,
    ],
    [
      'all of it where the device was silent at other times',
      [
        { from: -50, to: 0 },
        { from: 100, to: 150 },
      ],
      100,
    ],
  ])('is %s', (_, ofDevice, ownMs) => {
    expect(longestOwnSilenceMs({ from: 0, to: 100 }, ofDevice)).toBe(ownMs);
  });
});
