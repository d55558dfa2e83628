/** What a piece of care is about. */
export const careKinds = [
  'water',
  'feed',
  'trim',
  'pick',
  'clean',
  'washFlats',
  'inspect',
  'turn',
  'prickOut',
  'repot',
  'switchLamps',
  'switchHeatMat',
  'changeLamp',
  'checkSensor',
  'countGermination',
  'sow',
  'other',
] as const;
/** One of {@link careKinds}. */
export type CareKind = (typeof careKinds)[number];
