import type { CareKind } from '@shared/care/care-kind';

/** How a kind of care is shown. */
export interface CareKindLook {
  /** At the beginning of a line: "Water". */
  readonly word: string;
  /** Name of a Material symbol. */
  readonly icon: string;
}

/** How each kind of care is shown, in the order in which one chooses among them. */
export const careKindLooks: Readonly<Record<CareKind, CareKindLook>> = {
  water: { word: 'Water', icon: 'water_drop' },
  feed: { word: 'Feed', icon: 'science' },
  trim: { word: 'Trim', icon: 'content_cut' },
  pick: { word: 'Pick', icon: 'shopping_basket' },
  inspect: { word: 'Inspect for pests', icon: 'search' },
  turn: { word: 'Turn', icon: 'rotate_right' },
  prickOut: { word: 'Prick out', icon: 'grid_view' },
  repot: { word: 'Repot', icon: 'potted_plant' },
  sow: { word: 'Sow', icon: 'grain' },
  countGermination: { word: 'Count germination', icon: 'pin' },
  clean: { word: 'Clean', icon: 'mop' },
  washFlats: { word: 'Wash flats, look for leaks', icon: 'wash' },
  switchLamps: { word: 'Switch lamps', icon: 'lightbulb' },
  switchHeatMat: { word: 'Switch the heat mat', icon: 'mode_heat' },
  changeLamp: { word: 'Change a lamp', icon: 'light' },
  checkSensor: { word: 'Check a sensor', icon: 'sensors' },
  other: { word: 'Something else', icon: 'task_alt' },
};
