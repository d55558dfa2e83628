import { germination } from '../testing/planting-builder';
import { forecastBasis, forecastWords, germinationFacts, verdictWords } from './germination-words';

const day = (at: string): string => at.slice(8, 10);
const forecast = germination().forecast!;
const valueOf = (word: string, changes: Parameters<typeof germination>[0]): string | undefined =>
  germinationFacts(germination(changes)).find((fact) => fact.word === word)?.value;

describe('the figures of a sowing', () => {
  it('are dashes, and none of so many, before any is up', () => {
    expect(germinationFacts(germination()).map(({ value }) => value)).toEqual([
      '0 of 40, 0\u00a0%',
      '–',
      '–',
      '–',
      '–',
    ]);
  });

  it('tell a spread of no days from one that is not known', () => {
    expect(valueOf('Spread', { spreadDays: 0, up: 1 })).toBe('0\u00a0days');
    expect(valueOf('Spread', { spreadDays: 1, up: 2 })).toBe('1\u00a0day');
  });

  it('have their range and error where these are known', () => {
    const verdict = {
      lowPct: 62,
      highPct: 89,
      lotPct: null,
      againstLot: null,
      standardPct: null,
      standardSource: null,
      againstStandard: null,
      age: null,
    };
    const changes = {
      up: 31,
      percent: 77.5,
      verdict,
      meanTimeDays: 11.32,
      standardErrorDays: 0.24,
      t50Days: 10.8,
    };
    expect(valueOf('Up', changes)).toBe('31 of 40, 78\u00a0%, truly 62 to 89\u00a0%');
    expect(valueOf('Mean time', changes)).toBe('11.3 ± 0.2 days');
    expect(valueOf('T50', changes)).toBe('day 10.8');
  });

  it('are compared with the lot and the standard', () => {
    const verdict = {
      lowPct: 20,
      highPct: 48,
      lotPct: 80,
      againstLot: 'lower' as const,
      standardPct: 60,
      standardSource: 'federal rules',
      againstStandard: 'lower' as const,
      age: 'pastLife' as const,
    };
    expect(verdictWords(germination({ verdict, isOpen: true }))).toEqual([]);
    expect(verdictWords(germination({ verdict, isOpen: false }))).toEqual([
      'Came up fewer than the lot’s own test promised (80\u00a0%).',
      'That is fewer than the least for seed on sale (60\u00a0%, federal rules).',
      'The seed was past the life that the sources give it.',
    ]);
    expect(verdictWords(germination())).toEqual([]);
  });
});

describe('the forecast', () => {
  it('is a span of days, one day where both agree', () => {
    expect(forecastWords(forecast, day)).toBe('First seedlings expected from 01 to 07.');
    expect(forecastWords({ ...forecast, latest: forecast.earliest }, day)).toBe(
      'First seedlings expected 01.',
    );
  });

  it('that has passed says what was expected', () => {
    expect(forecastWords({ ...forecast, isLate: true }, day)).toBe('They were expected from 01 to 07.');
  });

  it('says when it can’t be said, and when it will never be', () => {
    expect(forecastWords({ ...forecast, earliest: null, latest: null }, day)).toContain('can’t be said');
    const never = { source: 'x', at: null };
    expect(forecastWords({ ...forecast, earliest: never, latest: never }, day)).toContain('never comes up');
    expect(forecastWords({ ...forecast, latest: never }, day)).toContain('not before 01');
  });

  it('names what it rests on', () => {
    expect(forecastBasis(forecast, '15.2 °C')).toBe(
      'By Extension table and Thermal time; counted from the root zone since sowing (98\u00a0% of the time measured), going on at 15.2 °C.',
    );
    expect(forecastBasis({ ...forecast, basis: 'room' }, null)).toMatch(/^By earlier sowings in this room;/);
    expect(forecastBasis({ ...forecast, measuredBy: null }, null)).toContain('no temperature was measured');
  });
});
