import { darkAllDay, hoursADay, lampHoursFrom } from './daily-lamp-hours';

// By the clock's face.
const plans = [
  ['06:00', 16, '22:00'],
  ['06:30', 13.5, '20:00'],
  ['20:00', 10.5, '06:30'],
  ['06:00', 24, '06:00'],
  ['00:00', 0.25, '00:15'],
] as const;

describe('daily lamp hours', () => {
  it.each(plans)('from %s on for %d h end at %s', (switchesOn, hours, switchesOff) => {
    expect(lampHoursFrom(switchesOn, hours)).toEqual({ switchesOn, switchesOff });
    expect(hoursADay({ switchesOn, switchesOff })).toBe(hours);
  });

  it('of a dark shelf are none', () => {
    expect(hoursADay(darkAllDay)).toBe(0);
  });
});
