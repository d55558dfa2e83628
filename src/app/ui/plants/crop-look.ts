import type { PlantHabit, PlantingStage } from '@shared/growing/planting-stage';
import type { PlantFamily, PlantForm } from './plant-forms';

/** What a drawing needs to know of a planting. */
export interface DrawnPlanting {
  readonly crop: string;
  readonly habit: PlantHabit;
  readonly stage: PlantingStage;
}

/** How a planting is drawn. */
export interface PlantLook {
  readonly form: PlantForm;
  readonly family: PlantFamily;
}

// Words in a crop's name, the more special before the more general.
const familyByWord: readonly (readonly [words: RegExp, family: PlantFamily])[] = [
  [/leek/, 'leek'],
  [/onion|shallot|chive|garlic/, 'onion'],
  [/tomato|aubergine/, 'tomato'],
  [/pepper|chilli/, 'pepper'],
  [/strawberr/, 'strawberry'],
  [/lettuce|rocket|spinach|cress|mustard/, 'lettuce'],
];

const familyByHabit: Readonly<Record<PlantHabit, PlantFamily>> = {
  blades: 'onion',
  rosette: 'lettuce',
  leafy: 'herb',
  bush: 'herb',
  fruiting: 'tomato',
  berry: 'strawberry',
  tree: 'citrus',
};

// Grown, but not in fruit.
const grownForm: Readonly<Record<PlantHabit, PlantForm>> = {
  blades: 'blades',
  rosette: 'rosette',
  leafy: 'leafy',
  bush: 'bush',
  fruiting: 'leafy',
  berry: 'rosette',
  tree: 'tree',
};

/** How a planting is drawn: its form after habit and stage, its colours after the crop, else after the habit. */
export function plantLook({ crop, habit, stage }: DrawnPlanting): PlantLook {
  const name = crop.toLowerCase();
  const family = familyByWord.find(([words]) => words.test(name))?.[1] ?? familyByHabit[habit];
  return { form: plantForm(habit, stage), family };
}

function plantForm(habit: PlantHabit, stage: PlantingStage): PlantForm {
  switch (stage) {
    case 'sown':
      return 'sown';
    case 'emerging':
      return 'hook';
    case 'seedling':
      return habit === 'blades' ? 'blades' : 'twoLeaves';
    case 'growingOn':
    case 'hardeningOff':
      return grownForm[habit];
    case 'fruiting':
      return habit === 'fruiting' || habit === 'berry' ? 'fruiting' : grownForm[habit];
    case 'resting':
      return habit === 'tree' ? 'tree' : 'resting';
    case 'out':
    case 'ended':
      return 'empty';
  }
}
