import { hazardWords, type Hazard } from '@shared/care/hazards';

export type { Hazard };

/** A hazard's icon and its line. */
export interface Caution {
  readonly icon: string;
  readonly text: string;
}

const icons: Readonly<Record<Hazard, string>> = {
  'water-near-mains': 'electric_bolt',
  'heat-mat': 'mode_heat',
  lamp: 'lightbulb',
  'broken-tube': 'warning',
  mould: 'masks',
  feed: 'science',
  'plant-protection': 'science',
  lifting: 'front_hand',
  eating: 'restaurant',
  seed: 'grain',
};

/** The usual caution for each hazard. */
export const cautions = Object.fromEntries(
  Object.entries(icons).map(([hazard, icon]) => [hazard, { icon, text: hazardWords[hazard as Hazard] }]),
) as Readonly<Record<Hazard, Caution>>;
