/** What can happen to a planting, as its time line tells it. */
export const plantingEventKinds = [
  'sown',
  'broughtIn',
  'counted',
  'staged',
  'moved',
  'prickedOut',
  'pottedOn',
  'split',
  'merged',
  'plantedOut',
  'lost',
  'harvested',
  'watered',
  'noted',
  'ended',
] as const;
/** One of {@link plantingEventKinds}. */
export type PlantingEventKind = (typeof plantingEventKinds)[number];

/** Stages that a person sets by hand; the others follow from counts and endings. */
export const settableStages = ['seedling', 'growingOn', 'fruiting', 'resting', 'hardeningOff'] as const;
/** One of {@link settableStages}. */
export type SettableStage = (typeof settableStages)[number];

/** Why plants were lost. */
export const lossReasons = [
  'dampingOff',
  'driedOut',
  'overwatered',
  'pests',
  'disease',
  'heat',
  'cold',
  'thinned',
  'givenAway',
  'accident',
  'unknown',
] as const;
/** One of {@link lossReasons}. */
export type LossReason = (typeof lossReasons)[number];
