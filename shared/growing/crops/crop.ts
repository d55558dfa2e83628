import type { ValueRange } from '../../series/time-weighted-statistics';
import type { OnionClass } from '../onion-class';
import type { PlantHabit } from '../planting-stage';
import type { SowingTimes } from '../sowing-window';
import type { Figure, Span } from './figure';
import type { ThermalTime } from './published/thermal-times';

/** Shelves of the crop library. */
export const cropGroups = [
  'alliums',
  'solanums',
  'brassicas',
  'leaves',
  'cucurbits',
  'legumes',
  'rootsAndStalks',
  'herbs',
  'fruit',
  'houseplants',
] as const;
/** One of {@link cropGroups}. */
export type CropGroup = (typeof cropGroups)[number];

/** Days to emergence at one temperature. */
export interface EmergenceAt {
  /** Soil temperature [°C]. */
  readonly temperatureC: number;
  /** Days to emergence; null where nothing germinated. */
  readonly days: number | null;
}

/** Normal seedlings at one temperature. */
export interface SeedlingsAt {
  /** Soil temperature [°C]. */
  readonly temperatureC: number;
  /** Share of the seeds [%]. */
  readonly percent: number;
}

/** Soil temperatures for germination [°C]; null where the source gives none. */
export interface GerminationTemperatures {
  readonly minC: number | null;
  readonly optimumC: Span;
  /** The single best temperature. */
  readonly bestC: number | null;
  readonly maxC: number | null;
}

/** What light does to germination. */
export type LightToGerminate = 'needed' | 'helps' | 'indifferent' | 'darkness';

/**
 * What is known of a crop's seed. Null, and an empty list, say that no figure was found. Where sources disagree, each has
 * its entry.
 */
export interface SeedFigures {
  readonly emergence: Figure<readonly EmergenceAt[]> | null;
  readonly normalSeedlings: Figure<readonly SeedlingsAt[]> | null;
  readonly temperatures: readonly Figure<GerminationTemperatures>[];
  readonly thermalTimes: readonly Figure<ThermalTime>[];
  /** Sowing depth [mm]. */
  readonly depthMm: Figure<Span> | null;
  readonly light: Figure<LightToGerminate> | null;
  /** Years that seed keeps. */
  readonly lifeYears: readonly Figure<Span>[];
  /** Least germination of seed for sale [%]. */
  readonly minimumGerminationPct: Figure<number> | null;
}

/** Stages that want a climate of their own. */
export type ClimateStage = 'germinating' | 'seedling' | 'growingOn' | 'fruiting' | 'resting' | 'hardeningOff';

/** What a crop wants at a stage; an open end is null, and a quantity is null where no figure was found. */
export interface StageClimate {
  /** Air temperature with lamps on [°C]. */
  readonly airDayC: Figure<ValueRange> | null;
  /** Air temperature with lamps off [°C]. */
  readonly airNightC: Figure<ValueRange> | null;
  /** Root-zone temperature [°C]. */
  readonly rootZoneC: Figure<ValueRange> | null;
  readonly relativeHumidityPct: Figure<ValueRange> | null;
  readonly vpdKPa: Figure<ValueRange> | null;
  /** Daily light integral [mol m⁻² d⁻¹]. */
  readonly dliMolM2D: Figure<ValueRange> | null;
  readonly illuminanceLx: Figure<ValueRange> | null;
  /** Hours of light a day. */
  readonly photoperiodH: Figure<Span> | null;
}

/** Limits of a crop's development. */
export interface DevelopmentLimits {
  /** Base temperature [°C]. */
  readonly baseC: number;
  /** Upper limit [°C]; null where none is stated. */
  readonly upperC: number | null;
}

/** How a crop answers to the length of the day. */
export type DayLengthResponse =
  /** Forms bulbs from so many hours of light on. */
  | { readonly kind: 'bulbs'; readonly fromHours: number; readonly onion: OnionClass | null }
  /** Runs to seed from so many hours of light on. */
  | { readonly kind: 'bolts'; readonly fromHours: number }
  /** Sets flowers only with at most so many hours of light. */
  | { readonly kind: 'flowersUnder'; readonly toHours: number }
  | { readonly kind: 'indifferent' };

/** Whether a plant harms cats or dogs that eat of it. */
export type PetToxicity = 'toxic' | 'notKnownToBeToxic';

/** What a growing room knows of a crop. A room may copy one and change it, so it is plain data. */
export interface Crop {
  /** Stable name for programs, kebab-case. */
  readonly id: string;
  /** Name for people. */
  readonly name: string;
  readonly botanicalName: string;
  readonly group: CropGroup;
  readonly habit: PlantHabit;
  /** What people eat of it; null for what is not food. */
  readonly eaten: string | null;
  readonly toxicToPets: Figure<PetToxicity> | null;
  /** Null for what is raised from cuttings, sets or cloves. */
  readonly seed: SeedFigures | null;
  readonly sowing: SowingTimes;
  readonly climate: Readonly<Partial<Record<ClimateStage, StageClimate>>>;
  readonly degreeDays: Figure<DevelopmentLimits> | null;
  readonly dayLength: Figure<DayLengthResponse> | null;
  readonly usualPot: Figure<string> | null;
}

const noSowing: SowingTimes = { weeksToTransplant: [], plantingOutWeeks: null, sowBeforeFrostWeeks: [] };

/** A crop as the library's files write it: what is left out has no figure. */
export type CropDraft = Pick<Crop, 'id' | 'name' | 'botanicalName' | 'habit' | 'eaten'> &
  Partial<Omit<Crop, 'sowing' | 'group'>> & { readonly sowing?: Partial<SowingTimes> };

/**
 * A crop from its draft.
 *
 * @param group - The shelf of the library that it stands on.
 * @param draft - What is known.
 * @returns The crop, with null and empty for what is not.
 */
export function defineCrop(group: CropGroup, draft: CropDraft): Crop {
  return {
    toxicToPets: null,
    seed: null,
    climate: {},
    degreeDays: null,
    dayLength: null,
    usualPot: null,
    ...draft,
    group,
    sowing: { ...noSowing, ...draft.sowing },
  };
}
