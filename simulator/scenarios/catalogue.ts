import type { MeasuredQuantity } from '@shared/climate/quantity';
import type { ScenarioDescription, ScenarioId, ScenarioSpan } from '@shared/contracts/simulation';
import type { ShelfDisturbance } from '../room/disturbance';

/** What a scenario does while it lasts. What is left out stays as it is. */
export interface ScenarioEffect {
  /** Outdoor air let into the room [g s⁻¹]. */
  readonly roomDraughtGS?: number;
  /** To the shelf that the scenario names. */
  readonly shelf?: Partial<ShelfDisturbance>;
  /** To the sensors of that shelf. */
  readonly sensors?: SensorEffect;
}

/** What a scenario does to a sensor. */
export interface SensorEffect {
  readonly isSilent?: boolean;
  /** How far the sensor has drifted by now, 0–1 of {@link fullDrift}. */
  readonly drift?: number;
}

/** A scenario: how a keeper reads of it, and what it does. It is pure: only the span and the instant decide. */
export interface Scenario extends Omit<ScenarioDescription, 'scenario'> {
  /**
   * @param span - Where and from when to when it runs.
   * @param passed - Share of the span that has passed, 0–1.
   */
  effect(span: ScenarioSpan, passed: number): ScenarioEffect;
}

/** Every scenario that the simulator can play. */
export const scenarios: Readonly<Record<ScenarioId, Scenario>> = {
  'timer-fails': {
    title: 'Lamp timer fails',
    description: 'The shelf’s lamp stays dark in its lamp hours, or stays lit through the night.',
    parameters: ['shelf', 'minutes', 'lamp'],
    effect: ({ lamp = 'dark' }) => ({ shelf: { lamp } }),
  },
  'mat-stuck-on': {
    title: 'Heat mat stuck on',
    description: 'The thermostat of the shelf’s heat mat no longer switches off.',
    parameters: ['shelf', 'minutes'],
    effect: () => ({ shelf: { isHeatMatStuckOn: true } }),
  },
  'sensor-silent': {
    title: 'Sensor falls silent',
    description: 'The shelf’s sensors, or one of them, send nothing.',
    parameters: ['shelf', 'minutes', 'quantity'],
    effect: () => ({ sensors: { isSilent: true } }),
  },
  'sensor-drift': {
    title: 'Sensor drifts',
    description: 'The shelf’s sensors, or one of them, show more and more beside the truth until the end.',
    parameters: ['shelf', 'minutes', 'quantity'],
    effect: (_span, passed) => ({ sensors: { drift: passed } }),
  },
  'door-open': {
    title: 'Door left open',
    description: 'Outdoor air blows into the room, and most of all onto this shelf.',
    parameters: ['shelf', 'minutes'],
    effect: () => ({ roomDraughtGS: 120, shelf: { draughtGS: 4 } }),
  },
  'dry-spell': {
    title: 'Dry spell by the radiator',
    description: 'A radiator warms fresh air and sends it over the shelf.',
    parameters: ['shelf', 'minutes'],
    effect: () => ({ shelf: { extraHeatW: 240, draughtGS: 13 } }),
  },
};

/** How far a drifting sensor is off in the end: added, or for light multiplied, because a dusty sensor still sees the dark. */
export const fullDrift: Readonly<
  Record<MeasuredQuantity, { readonly add: number; readonly multiply: number }>
> = {
  airTemperature: { add: 4, multiply: 1 },
  rootZoneTemperature: { add: 4, multiply: 1 },
  relativeHumidity: { add: 14, multiply: 1 },
  ppfd: { add: 0, multiply: 0.6 },
  illuminance: { add: 0, multiply: 0.6 },
};
