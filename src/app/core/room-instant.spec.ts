import { fieldTime, typedInstant } from './room-instant';

// Offsets by the IANA database: Dublin is UTC in winter and UTC+1 in summer; New York is UTC−5 and UTC−4.
describe('day and time by the room’s clock', () => {
  it.each([
    ['2026-12-01T14:20', 'Europe/Dublin', '2026-12-01T14:20:00.000Z'],
    ['2026-07-01T14:20', 'Europe/Dublin', '2026-07-01T13:20:00.000Z'],
    ['2026-12-01T22:00', 'America/New_York', '2026-12-02T03:00:00.000Z'],
  ])('%s in %s is %s, and back', (typed, zone, instant) => {
    expect(typedInstant(typed, zone)).toBe(instant);
    expect(fieldTime(instant, zone)).toBe(typed);
  });

  it('that no clock shows in spring is the hour after', () => {
    expect(typedInstant('2026-03-29T01:30', 'Europe/Dublin')).toBe('2026-03-29T01:30:00.000Z');
  });

  it('left empty is now, for the server to say', () => {
    expect(typedInstant('', 'Europe/Dublin')).toBeUndefined();
  });
});
