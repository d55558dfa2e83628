import type { AlertKind } from '@shared/alerts/alert-rule';

/** Kinds whose peak and limit are values of the quantity itself, and not of something computed from it. */
const valueKinds: readonly AlertKind[] = [
  'aboveRange',
  'belowRange',
  'dangerHigh',
  'dangerLow',
  'lampDark',
  'lampLit',
];

/** Whether an alert's peak and limit can be read off the chart of its quantity. */
export function isValueKind(kind: AlertKind): boolean {
  return valueKinds.includes(kind);
}
