import { alertLook } from './alert-look';

describe('the mark of an alert', () => {
  it.each([
    ['aboveRange', 'ember', 'arrow_upward'],
    ['dangerHigh', 'ember', 'arrow_upward'],
    ['belowRange', 'frost', 'arrow_downward'],
    ['fastFall', 'frost', 'arrow_downward'],
    ['lampDark', 'lamp', 'lightbulb'],
    ['lightShort', 'lamp', 'lightbulb'],
    ['sensorSilent', 'lamp', 'sensors_off'],
    ['sensorFailed', 'lamp', 'sensors_off'],
  ] as const)('%s is %s with %s', (kind, tone, icon) => {
    expect(alertLook(kind)).toEqual({ tone, icon });
  });
});
