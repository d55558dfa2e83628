import type { CareKind } from './care-kind';
import { hazardWords, type Hazard } from './hazards';

/** What can hurt someone at each kind of care. Common practice in the trade, with no source. */
export const careHazards: Readonly<Record<CareKind, readonly Hazard[]>> = {
  water: ['water-near-mains'],
  feed: ['feed', 'water-near-mains'],
  trim: [],
  pick: ['eating'],
  clean: ['water-near-mains', 'mould'],
  washFlats: ['water-near-mains', 'lifting'],
  inspect: ['plant-protection'],
  turn: [],
  prickOut: [],
  repot: ['lifting'],
  switchLamps: ['lamp'],
  switchHeatMat: ['heat-mat'],
  changeLamp: ['lamp', 'broken-tube'],
  checkSensor: ['water-near-mains'],
  countGermination: [],
  sow: ['seed'],
  other: [],
};

/** The usual cautions at a kind of care, in words. */
export function careCautions(kind: CareKind): string[] {
  return careHazards[kind].map((hazard) => hazardWords[hazard]);
}
