import type { PlantingDrying } from '@shared/contracts/care-record';
import { dryingBand, dryingLines, dryingWords, wateringMarks } from './drying-chart';

const watered = {
  from: '2026-11-28T08:00:00Z',
  to: '2026-11-30T08:00:00Z',
  integralKPaH: 48,
  coverage: 0.97,
  millilitres: 600,
  isLearnedFrom: true,
};
const drying: PlantingDrying = {
  at: '2026-12-01T14:20:00Z',
  fallbackDays: 3,
  spans: [watered, { ...watered, from: watered.to, to: null, millilitres: null, isLearnedFrom: false }],
  curve: [
    { at: '2026-11-30T08:00:00Z', integralKPaH: 0 },
    { at: '2026-12-01T14:00:00Z', integralKPaH: 30 },
  ],
  interval: { medianKPaH: 48, lowKPaH: 44, highKPaH: 52, count: 6 },
  standing: 'notYet',
  dueAt: '2026-12-02T09:00:00Z',
};
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('waterings against drying', () => {
  it('are drawn with the band in which water was wanted, and the waterings as marks', () => {
    expect(dryingLines(drying)[0]?.points).toEqual([
      [Date.parse('2026-11-30T08:00:00Z'), 0, 0, 0],
      [Date.parse('2026-12-01T14:00:00Z'), 30, 30, 30],
    ]);
    expect(dryingBand(drying)).toMatchObject([{ low: 44, high: 52 }]);
    expect(wateringMarks(drying).map(({ text }) => plain(text))).toEqual(['Watered, 600 ml']);
  });

  it('have neither line nor band without readings', () => {
    expect(dryingLines({ curve: [] })).toEqual([]);
    expect(dryingLines({ curve: drying.curve.slice(0, 1) })).toEqual([]);
    expect(dryingBand({ ...drying, curve: [] })).toEqual([]);
  });

  it('say what was learned and when water is due', () => {
    expect(plain(dryingWords(drying, 'tomorrow 09:00'))).toBe(
      'It asks for water after about 48 kPa·h (44–52 kPa·h, from 6 waterings). Not yet now, tomorrow 09:00 if the air stays as thirsty.',
    );
    expect(plain(dryingWords({ ...drying, standing: 'due' }, null))).toContain('Now it is due.');
  });

  it('say how it goes until enough is learned', () => {
    const words = dryingWords({ ...drying, interval: null, standing: null }, null);
    expect(words).toContain('So far 1 has taught. Until then it counts 3 days.');
  });
});
