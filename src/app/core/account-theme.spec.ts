import { themeOf, viewOf } from './account-theme';

describe('the view of an account', () => {
  it.each([
    ['system', null],
    ['day', 'day'],
    ['lampsOff', 'lamps-off'],
  ] as const)('%s is %s on a device, and back', (theme, view) => {
    expect(viewOf(theme)).toBe(view);
    expect(themeOf(view)).toBe(theme);
  });
});
