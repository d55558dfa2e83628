import type { LightOfDay } from '@shared/contracts/series';
import { lightRows, lightSummary } from './light-sums';

const day = (changes: Partial<LightOfDay> = {}): LightOfDay => ({
  day: '2026-11-30',
  lightHours: 16,
  plannedHours: 16,
  dliMolM2D: 14,
  coverage: 1,
  ...changes,
});

describe('the light of days', () => {
  it('is listed newest first, with what is known of each', () => {
    const rows = lightRows(
      [
        day({ day: '2026-11-29', lightHours: 0, coverage: 0, dliMolM2D: null }),
        day({ lightHours: 0, plannedHours: 10.5, dliMolM2D: 0, coverage: 0.6 }),
      ],
      '2026-12-01',
    );
    expect(rows).toMatchObject([
      { when: 'Mon 30 Nov', hours: '0.0 of 10.5\u00a0h', dli: '0.0', reservation: '60\u00a0% held' },
      { when: 'Sun 29 Nov', hours: '–', dli: '–', reservation: '0\u00a0% held' },
    ]);
    expect(lightRows([day()], '2026-12-01')[0]?.reservation).toBeNull();
    expect(lightRows([day({ coverage: 0.6 })], '2026-11-30')[0]?.reservation).toBe('so far');
  });

  it('is averaged over days that were measured, dark ones among them', () => {
    const light = [day(), day({ lightHours: 0, dliMolM2D: 0 }), day({ lightHours: 3, coverage: 0.4 })];
    expect(lightSummary(light)).toBe('8.0\u00a0h a day · DLI 7.0\u00a0mol/m²');
  });

  it('has no daily light integral without a sensor for it', () => {
    expect(lightSummary([day({ dliMolM2D: null })])).toBe('16.0\u00a0h a day');
    expect(lightSummary([day({ coverage: 0.5 })])).toBeNull();
  });
});
