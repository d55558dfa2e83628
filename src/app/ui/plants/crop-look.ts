import type { PlantFamily, PlantForm } from './plant-forms';

/** How a grown plant stands. */
export type PlantHabit = 'blades' | 'leafy' | 'bush' | 'tree';

/** A crop's colours and habit. */
export interface CropLook {
  readonly family: PlantFamily;
  readonly habit: PlantHabit;
}

// Words in a crop's name, the more special before the more general.
const looks: readonly (readonly [words: RegExp, look: CropLook])[] = [
  [/leek/, { family: 'leek', habit: 'blades' }],
  [/onion|shallot|chive|garlic|lemongrass|grass/, { family: 'onion', habit: 'blades' }],
  [/tomato|aubergine|cucumber/, { family: 'tomato', habit: 'leafy' }],
  [/pepper|chilli/, { family: 'pepper', habit: 'leafy' }],
  [/strawberr/, { family: 'strawberry', habit: 'bush' }],
  [/citrus|lemon|lime|orange|calamondin|kumquat|fig|olive/, { family: 'citrus', habit: 'tree' }],
  [/lettuce|rocket|spinach|chard|pak choi|cress|mustard|microgreen/, { family: 'lettuce', habit: 'bush' }],
  [/basil|mint|lemon balm|oregano/, { family: 'herb', habit: 'leafy' }],
];

/** How a crop is drawn, by its name; a crop that is not known looks like a herb. */
export function cropLook(crop: string): CropLook {
  const name = crop.toLowerCase();
  return looks.find(([words]) => words.test(name))?.[1] ?? { family: 'herb', habit: 'bush' };
}

/** The stages of a planting that change its looks. */
export type DrawnStage =
  'sown' | 'emerging' | 'seedling' | 'growingOn' | 'fruiting' | 'resting' | 'hardeningOff' | 'out' | 'ended';

/** The form in which a planting of this habit and stage is drawn. */
export function plantForm(habit: PlantHabit, stage: DrawnStage): PlantForm {
  switch (stage) {
    case 'sown':
      return 'sown';
    case 'emerging':
      return 'hook';
    case 'seedling':
      return habit === 'blades' ? 'blades' : 'twoLeaves';
    case 'growingOn':
    case 'hardeningOff':
      return habit;
    case 'fruiting':
      return habit === 'tree' ? 'tree' : 'fruiting';
    case 'resting':
      return habit === 'tree' ? 'tree' : 'resting';
    case 'out':
    case 'ended':
      return 'empty';
  }
}
