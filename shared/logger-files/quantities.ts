/** What a column of a logger file can measure. The last three are computed here and so only compared. */
export type LoggerQuantity =
  | 'airTemperature'
  | 'rootZoneTemperature'
  | 'relativeHumidity'
  | 'ppfd'
  | 'illuminance'
  | 'vapourPressureDeficit'
  | 'dewPoint'
  | 'absoluteHumidity';

/** What units must have in common to be converted into each other. */
export type UnitDimension =
  'temperature' | 'humidity' | 'photonFlux' | 'illuminance' | 'pressure' | 'density';

/** How a quantity is stored and which values a file may bring. */
export interface QuantityRule {
  /** Dimension that a column's unit must have. */
  readonly dimension: UnitDimension;
  /** Words for people, as in "air temperature". */
  readonly label: string;
  /** Lowest value accepted, in the stored unit. */
  readonly low: number;
  /** Highest value accepted, in the stored unit. */
  readonly high: number;
  /** True where the value is never stored, only compared with what is computed from temperature and humidity. */
  readonly isCompared: boolean;
}

/**
 * Rules of every quantity. The limits only keep out what no sensor near plants can have measured (a slipped
 * column, a sentinel such as -9999); whether a value is believable is for the quality tests.
 * Common practice, no source.
 */
export const quantityRules: Readonly<Record<LoggerQuantity, QuantityRule>> = {
  airTemperature: rule('temperature', 'air temperature', -60, 100),
  rootZoneTemperature: rule('temperature', 'root-zone temperature', -60, 100),
  relativeHumidity: rule('humidity', 'relative humidity', 0, 110),
  ppfd: rule('photonFlux', 'photosynthetic photon flux density', -20, 5000),
  illuminance: rule('illuminance', 'illuminance', 0, 300_000),
  vapourPressureDeficit: rule('pressure', 'vapour pressure deficit', -5, 20, true),
  dewPoint: rule('temperature', 'dew point', -80, 100, true),
  absoluteHumidity: rule('density', 'absolute humidity', 0, 600, true),
};

function rule(
  dimension: UnitDimension,
  label: string,
  low: number,
  high: number,
  isCompared = false,
): QuantityRule {
  return { dimension, label, low, high, isCompared };
}
