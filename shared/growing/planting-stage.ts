/** The stages a planting goes through, in their usual order. */
export const plantingStages = [
  'sown',
  'emerging',
  'seedling',
  'growingOn',
  'fruiting',
  'resting',
  'hardeningOff',
  'out',
  'ended',
] as const;
/** One of {@link plantingStages}. */
export type PlantingStage = (typeof plantingStages)[number];

/** How a plant stands, for drawing it: its outline once grown. */
export const plantHabits = ['blades', 'rosette', 'leafy', 'bush', 'fruiting', 'berry', 'tree'] as const;
/** One of {@link plantHabits}. */
export type PlantHabit = (typeof plantHabits)[number];
