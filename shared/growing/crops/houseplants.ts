import { defineCrop, type Crop, type CropDraft, type PetToxicity } from './crop';
import { cited, practised, remembered, span } from './figure';
import type { PlantHabit } from '../planting-stage';
import { air, range, stageClimate } from './stage-climates';

const LUX_PER_FOOT_CANDLE = 10.7639;
const ILLINOIS = 'University of Illinois Extension: low 75, medium 150, bright 300, direct 1500 foot-candles';

/**
 * Light classes of houseplants [foot-candles]. Another scale (University of Missouri G6515) has low 50–250, medium 250–1000
 * and high above 1000: by it a plant in medium light here still stands in low light.
 */
const leastFootCandles = { low: 75, medium: 150, bright: 300, direct: 1500 } as const;
/** How much light a houseplant asks for. */
export type HouseplantLight = keyof typeof leastFootCandles;

/** A houseplant in one line. */
type Row = readonly [
  id: string,
  name: string,
  botanicalName: string,
  light: HouseplantLight,
  habit: PlantHabit,
  pets: PetToxicity,
];

const rows: readonly Row[] = [
  ['cast-iron-plant', 'Cast-iron plant', 'Aspidistra elatior', 'low', 'blades', 'notKnownToBeToxic'],
  ['snake-plant', 'Snake plant', 'Dracaena trifasciata', 'low', 'blades', 'toxic'],
  ['peace-lily', 'Peace lily', 'Spathiphyllum species', 'low', 'leafy', 'toxic'],
  ['pothos', 'Pothos', 'Epipremnum aureum', 'low', 'leafy', 'toxic'],
  ['boston-fern', 'Boston fern', 'Nephrolepis exaltata', 'medium', 'leafy', 'notKnownToBeToxic'],
  ['spider-plant', 'Spider plant', 'Chlorophytum comosum', 'medium', 'blades', 'notKnownToBeToxic'],
  ['philodendron', 'Philodendron', 'Philodendron hederaceum', 'medium', 'leafy', 'toxic'],
  ['african-violet', 'African violet', 'Streptocarpus ionanthus', 'bright', 'rosette', 'notKnownToBeToxic'],
  ['monstera', 'Monstera', 'Monstera deliciosa', 'bright', 'leafy', 'toxic'],
  ['christmas-cactus', 'Christmas cactus', 'Schlumbergera species', 'bright', 'leafy', 'notKnownToBeToxic'],
  ['aloe', 'Aloe', 'Aloe vera', 'direct', 'rosette', 'toxic'],
  ['jade-plant', 'Jade plant', 'Crassula ovata', 'direct', 'bush', 'toxic'],
];

/** Houseplants that set buds only while days are short. */
const shortDayFlowering: ReadonlySet<string> = new Set(['christmas-cactus']);

function draft([id, name, botanicalName, light, habit, pets]: Row): CropDraft {
  return {
    id,
    name,
    botanicalName,
    habit,
    eaten: null,
    toxicToPets: remembered(pets),
    climate: {
      growingOn: stageClimate({
        ...air(range(18, 26), range(15, 23)),
        relativeHumidityPct: practised(range(40, null)),
        illuminanceLx: cited(
          range(Math.round(leastFootCandles[light] * LUX_PER_FOOT_CANDLE), null),
          ILLINOIS,
        ),
        photoperiodH: practised(span(10, 14)),
      }),
    },
    dayLength: shortDayFlowering.has(id) ? remembered({ kind: 'flowersUnder', toHours: 12 }) : null,
    usualPot: practised('as wide as a third of its height, or what it came in'),
  };
}

/** Houseplants, from those that bear shade to those that want the sun. */
export const houseplants: readonly Crop[] = rows.map((row) => defineCrop('houseplants', draft(row)));
