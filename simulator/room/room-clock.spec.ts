import { isWithinLampHours, lampMinutes, RoomClock } from './room-clock';

describe('the room’s clock', () => {
  it('shows Dublin’s summer and winter time on either side of the change', () => {
    const clock = new RoomClock('Europe/Dublin');
    expect(clock.wallTimeAt(Date.parse('2025-10-26T00:59:00Z')).minute).toBe(1 * 60 + 59);
    expect(clock.wallTimeAt(Date.parse('2025-10-26T01:00:00Z')).minute).toBe(1 * 60);
  });

  it('counts days on the room’s calendar, also east of Greenwich before midnight UTC', () => {
    const clock = new RoomClock('Asia/Kathmandu');
    const { day, minute } = clock.wallTimeAt(Date.parse('2025-01-01T18:20:00Z'));
    expect({ day, minute }).toEqual({ day: Date.parse('2025-01-02') / 86_400_000, minute: 5 });
  });

  it('refuses a zone that does not exist', () => {
    expect(() => new RoomClock('Nowhere/Town')).toThrow(RangeError);
  });
});

describe('lamp hours', () => {
  it.each([
    ['06:00', '22:00', 359, false],
    ['06:00', '22:00', 360, true],
    ['06:00', '22:00', 1319, true],
    ['06:00', '22:00', 1320, false],
    ['20:00', '12:00', 0, true],
    ['20:00', '12:00', 720, false],
    ['20:00', '12:00', 1200, true],
    ['00:00', '00:00', 700, true],
  ])('from %s to %s at minute %d: lit is %s', (on, off, minute, isLit) => {
    expect(isWithinLampHours([lampMinutes({ on, off })], minute)).toBe(isLit);
  });

  it('of a shelf without a plan are none', () => {
    expect(isWithinLampHours([], 720)).toBe(false);
  });
});
