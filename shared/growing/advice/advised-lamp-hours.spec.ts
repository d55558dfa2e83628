import { darkAllDay } from '../../climate/daily-lamp-hours';
import { advisedLampHours } from './advised-lamp-hours';

const lit = { switchesOn: '07:30', switchesOff: '17:30' };

describe('the lamp hours that advice comes to', () => {
  it.each([
    ['switchOn', 12, darkAllDay, { switchesOn: '06:00', switchesOff: '18:00' }],
    ['lengthen', 14, lit, { switchesOn: '07:30', switchesOff: '21:30' }],
    ['shorten', 8, lit, { switchesOn: '07:30', switchesOff: '15:30' }],
    ['switchOff', null, lit, darkAllDay],
  ] as const)('to %s, %s h, keep their start', (change, hours, planned, advised) => {
    expect(advisedLampHours({ change, hours }, planned)).toEqual(advised);
  });

  it('are none without a change, and none where no figure says how long', () => {
    expect(advisedLampHours({ change: null, hours: 12 }, lit)).toBeNull();
    expect(advisedLampHours({ change: 'switchOn', hours: null }, darkAllDay)).toBeNull();
  });
});
