import { DomainError } from '../errors/domain-error';
import { monthBounds } from './room-months';

const hours = ({ start, end }: { start: number; end: number }): number => (end - start) / 3_600_000;

describe('a month of a room’s calendar', () => {
  it('begins at the room’s midnight, not at UTC’s', () => {
    // The tz database: Dublin is on UTC+1 from 29 March to 25 October 2026, Auckland on UTC+13 until 5 April.
    expect(new Date(monthBounds('2026-07', 'Europe/Dublin').start).toISOString()).toBe(
      '2026-06-30T23:00:00.000Z',
    );
    expect(new Date(monthBounds('2026-04', 'Pacific/Auckland').start).toISOString()).toBe(
      '2026-03-31T11:00:00.000Z',
    );
  });

  it.each([
    ['2026-03', 31 * 24 - 1],
    ['2026-10', 31 * 24 + 1],
    ['2026-12', 31 * 24],
    ['2028-02', 29 * 24],
  ])('%s in Dublin has %d hours', (month, expected) => {
    expect(hours(monthBounds(month, 'Europe/Dublin'))).toBe(expected);
  });

  it('touches the next one, over the turn of the year too', () => {
    expect(monthBounds('2026-12', 'Europe/Dublin').end).toBe(monthBounds('2027-01', 'Europe/Dublin').start);
  });

  it.each(['2026-13', '2026', 'april'])('refuses %s', (month) => {
    expect(() => monthBounds(month, 'UTC')).toThrow(DomainError);
  });
});
