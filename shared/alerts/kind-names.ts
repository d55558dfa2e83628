import type { AlertKind } from './alert-rule';

/** What each kind of alert is called at the beginning of a line. */
export const kindNames: Readonly<Record<AlertKind, string>> = {
  aboveRange: 'Above the wanted range',
  belowRange: 'Below the wanted range',
  fastRise: 'Rising too fast',
  fastFall: 'Falling too fast',
  sensorSilent: 'Sensor silent',
  deviceSilent: 'Device silent',
  sensorFailed: 'Sensor failed its tests',
  sensorsDisagree: 'Sensors disagree',
  lampDark: 'Dark when lit was planned',
  lampLit: 'Lit when dark was planned',
  lightShort: 'Too few hours of light',
  lightSumShort: 'Too little light a day',
  matStuckOn: 'Heat mat left on',
  condensation: 'Below the dew point',
  wetHours: 'Wet for too long',
  dangerHigh: 'Dangerously high',
  dangerLow: 'Dangerously low',
};
