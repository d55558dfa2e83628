import { clockAt, instantOnClock, quietChoices } from './quiet-choices';

const zone = 'Europe/Dublin';
const offered = (now: string): string[] =>
  quietChoices(Date.parse(now), zone).map(
    ({ words, until }) => `${words}: ${new Date(until).toISOString().slice(0, 16)}`,
  );

describe('until when an alert may be quiet', () => {
  it('is an hour, this evening or tomorrow morning by the room’s clock', () => {
    // Summer time: 20:00 in Dublin is 19:00 UTC.
    expect(offered('2026-06-10T12:00:00Z')).toEqual([
      'For an hour: 2026-06-10T13:00',
      'Until this evening: 2026-06-10T19:00',
      'Until tomorrow morning: 2026-06-11T07:00',
    ]);
  });

  it('leaves this evening out once it is within the hour', () => {
    expect(offered('2026-06-10T18:00:00Z')).toEqual([
      'For an hour: 2026-06-10T19:00',
      'Until tomorrow morning: 2026-06-11T07:00',
    ]);
  });

  it('offers this morning in the small hours', () => {
    expect(offered('2026-12-10T02:00:00Z')[1]).toBe('Until this morning: 2026-12-10T08:00');
  });

  it('names the morning by the clock through nights in which the clocks change', () => {
    // The tz database: Dublin goes forward on 29 March and back on 25 October 2026, both at 01:00 UTC.
    expect(offered('2026-03-28T22:00:00Z').at(-1)).toBe('Until tomorrow morning: 2026-03-29T07:00');
    expect(offered('2026-10-24T22:00:00Z').at(-1)).toBe('Until tomorrow morning: 2026-10-25T08:00');
  });
});

describe('a time on the room’s clock', () => {
  it.each([
    ['2026-06-10T21:30', '2026-06-10T20:30:00.000Z'],
    ['2026-12-10T21:30', '2026-12-10T21:30:00.000Z'],
    // Skipped in spring, so an hour later.
    ['2026-03-29T01:30', '2026-03-29T01:30:00.000Z'],
  ])('%s is %s', (text, instant) => {
    expect(new Date(instantOnClock(text, zone) ?? NaN).toISOString()).toBe(instant);
  });

  it.each(['', '2026-06-10', 'tomorrow', '2026-13-10T21:30'])('%j is none', (text) => {
    expect(instantOnClock(text, zone)).toBeNull();
  });

  it('comes back as it was written', () => {
    expect(clockAt(instantOnClock('2026-06-10T21:30', zone) ?? NaN, zone)).toBe('2026-06-10T21:30');
  });
});
