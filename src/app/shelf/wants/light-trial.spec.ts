import type { LightOfDay } from '@shared/contracts/series';
import { lightTrialWords } from './light-trial';

const zone = 'Europe/Dublin';
const light = (...sums: (number | null)[]): LightOfDay[] =>
  sums.map((dliMolM2D, index) => ({
    day: `2026-03-${20 + index}`,
    lightHours: 14,
    plannedHours: 14,
    dliMolM2D,
    coverage: 1,
  }));

describe('what a least light of a day would have done', () => {
  it.each([
    [
      8,
      light(9.2, 9.9, 9),
      'The last 3 days measured came to 9.0–9.9 mol/m². None falls short of that, and an alert would not have opened.',
    ],
    [
      10,
      light(9.2, 9.9, 9),
      'The last 3 days measured came to 9.0–9.9 mol/m². All fall short of that, and an alert would have opened once.',
    ],
    [
      9.5,
      light(9.2, 9.9, 9.6),
      'The last 3 days measured came to 9.2–9.9 mol/m². 1 of them falls short of that, and an alert would not have opened.',
    ],
    [
      9.5,
      light(9, 9, 9, 9.9, 9, 9, 9),
      'The last 7 days measured came to 9.0–9.9 mol/m². 6 of them fall short of that, and an alert would have opened 2 times.',
    ],
    [
      0,
      light(0),
      'The one day measured came to 0.0 mol/m². None falls short of that, and an alert would not have opened.',
    ],
  ])('of %d over %j is told', (least, days, words) => {
    expect(lightTrialWords(least, days, zone)).toBe(words);
  });

  it('is not told from days that were hardly measured, or of which nothing is known', () => {
    const none = 'No day of the last two weeks was measured well enough to try it on.';
    expect(lightTrialWords(8, light(null), zone)).toBe(none);
    expect(
      lightTrialWords(
        8,
        light(2).map((day) => ({ ...day, coverage: 0.5 })),
        zone,
      ),
    ).toBe(none);
  });
});
