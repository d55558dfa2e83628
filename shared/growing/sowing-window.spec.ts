import { cited, span } from './crops/figure';
import {
  sowingStanding,
  sowingWindows,
  staggeredSowings,
  transplantDates,
  type SowingTimes,
} from './sowing-window';

const nothing: SowingTimes = { weeksToTransplant: [], plantingOutWeeks: null, sowBeforeFrostWeeks: [] };

// Weeks to transplant size: Cornell NYSIPM Table 9.1.1 and Purdue for onion, which contradict each other.
const onion: SowingTimes = {
  ...nothing,
  weeksToTransplant: [cited(span(6, 8), 'Cornell'), cited(span(10, 12), 'Purdue')],
  plantingOutWeeks: cited(span(-6, -2), 'gardening articles'),
};

describe('sowingWindows', () => {
  it('keeps sources that disagree apart and spans them', () => {
    // By hand, from 2025-05-15: Cornell 14 to 8 weeks before, Purdue 18 to 12 weeks before.
    expect(sowingWindows(onion, '2025-05-15')).toEqual({
      opens: '2025-01-09',
      closes: '2025-03-20',
      bySource: [
        { opens: '2025-02-06', closes: '2025-03-20', source: 'Cornell' },
        { opens: '2025-01-09', closes: '2025-02-20', source: 'Purdue' },
      ],
    });
  });

  it.each([
    // By the calendar; the second crosses 29 February and, in many zones, a change of clocks.
    ['2025-05-15', '2025-03-06'],
    ['2024-05-01', '2024-02-21'],
  ])('ten weeks before %s is %s', (lastFrost, day) => {
    const times = { ...nothing, sowBeforeFrostWeeks: [cited(span(10), 'a rule')] };

    expect(sowingWindows(times, lastFrost)).toMatchObject({ opens: day, closes: day });
  });

  it('is null without figures, and for a crop that never goes out', () => {
    expect(sowingWindows(nothing, '2025-05-15')).toBeNull();
    expect(sowingWindows({ ...onion, plantingOutWeeks: null }, '2025-05-15')).toBeNull();
  });

  it('refuses a frost date that is none', () => {
    expect(() => sowingWindows(onion, '2025-02-30')).toThrow(
      expect.objectContaining({ code: 'INVALID_ARGUMENT' }),
    );
  });
});

describe('sowingStanding', () => {
  it.each([
    ['2025-01-08', 'notYet'],
    ['2025-01-09', 'open'],
    ['2025-03-20', 'open'],
    ['2025-03-21', 'past'],
  ])('on %s is %s', (day, standing) => {
    expect(sowingStanding({ opens: '2025-01-09', closes: '2025-03-20' }, day)).toBe(standing);
  });
});

describe('staggeredSowings', () => {
  it('every two weeks run from the first day to the last that fits, over a leap day', () => {
    expect(staggeredSowings({ opens: '2024-02-10', closes: '2024-03-23' }, 14)).toEqual([
      '2024-02-10',
      '2024-02-24',
      '2024-03-09',
      '2024-03-23',
    ]);
  });

  it('refuses to sow without a pause', () => {
    expect(() => staggeredSowings({ opens: '2024-02-10', closes: '2024-03-23' }, 0)).toThrow(
      expect.objectContaining({ code: 'OUT_OF_RANGE' }),
    );
  });
});

describe('transplantDates', () => {
  it('span the sources and name those at the ends', () => {
    // 6 and 12 weeks after 1 February.
    expect(transplantDates(onion, '2025-02-01')).toEqual({
      earliest: '2025-03-15',
      latest: '2025-04-26',
      source: 'Cornell; Purdue',
    });
  });

  it('are null without figures', () => {
    expect(transplantDates(nothing, '2025-02-01')).toBeNull();
  });
});
