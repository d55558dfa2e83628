import type { ValueRange } from '../../series/time-weighted-statistics';
import type { LightShortage } from '../light-need';
import type { StandingPlanting } from './standing-planting';

/** A shelf as advice needs to know it. */
export interface AdvisedShelf {
  /** Its label, such as `A3`. */
  readonly label: string;
  readonly plantings: readonly StandingPlanting[];
  readonly hasLamp: boolean;
  /** Hours of lamps a day as they are planned now, 0 for a dark shelf; null when not known. */
  readonly lampHours: number | null;
  readonly hasHeatMat: boolean;
  /** Null when not known. */
  readonly isHeatMatOn: boolean | null;
  /** Temperature that the shelf has without its mat [°C]; null when not measured. */
  readonly unheatedC: number | null;
  /** Plantings on it that have lived on too little light, by their ids. */
  readonly shortages: ReadonlyMap<string, LightShortage>;
}

/** What wanted ranges are for. */
export type WantedQuantity =
  | 'airTemperature'
  | 'rootZoneTemperature'
  | 'relativeHumidity'
  | 'vapourPressureDeficit'
  | 'illuminance'
  | 'dailyLightIntegral';

/** When a wanted range holds. */
export type LampSide = 'lampsOn' | 'lampsOff' | 'always';

/** The range that suits everything on a shelf. */
export interface WantedAdvice {
  readonly quantity: WantedQuantity;
  readonly when: LampSide;
  readonly range: ValueRange;
  /** Whose ends these are, for a person. */
  readonly reason: string;
  /** Sources of the two ends. */
  readonly source: string;
}

/** Something that a shelf cannot give to all that stands on it. */
export interface ShelfConflict {
  readonly kind: 'range' | 'photoperiod' | 'heatMat' | 'noHeatMat' | 'noLamp';
  /** For `range` alone. */
  readonly quantity: WantedQuantity | null;
  readonly when: LampSide;
  /** Those that do not go together, by their ids. */
  readonly plantingIds: readonly string[];
  /** Distance between what they want, in the unit of the quantity (photoperiod: h); null where there is none to name. */
  readonly gap: number | null;
  /** A sentence for a person, with the names and the gap. */
  readonly sentence: string;
}

/** A crop that the length of the lamps' day would set off. */
export interface DayLengthWarning {
  readonly plantingId: string;
  readonly kind: 'bulbs' | 'bolts' | 'staysWithoutFlowers';
  readonly sentence: string;
}

/** What to do with the lamps. */
export interface LampAdvice {
  readonly state: 'on' | 'off';
  /** Hours a day; null when they are off, or when no crop here has a figure. */
  readonly hours: number | null;
  readonly reason: string;
  /** What to change now; null when nothing, or when the present plan is not known. */
  readonly change: 'switchOn' | 'switchOff' | 'lengthen' | 'shorten' | null;
}

/** What to do with the heat mat; in a `conflict` it suits one and harms another. */
export interface HeatMatAdvice {
  readonly state: 'on' | 'off' | 'conflict';
  readonly reason: string;
  readonly change: 'switchOn' | 'switchOff' | null;
}

/** A shelf to which plantings of a conflict could move. */
export interface MoveSuggestion {
  /** Label of the shelf that fits. */
  readonly shelf: string;
  /** Plantings any one of which could move there. */
  readonly plantingIds: readonly string[];
  readonly sentence: string;
}
