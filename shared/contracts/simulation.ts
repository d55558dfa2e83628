import * as z from 'zod';
import { measuredQuantities } from '../climate/quantity';
import { clockTime, instant } from './endpoint';

/** The scenarios that the simulator can play: each is one thing that goes wrong in a real room. */
export const scenarioId = z.enum([
  'timer-fails',
  'mat-stuck-on',
  'sensor-silent',
  'sensor-drift',
  'door-open',
  'dry-spell',
]);
export type ScenarioId = z.infer<typeof scenarioId>;

/** Daily lamp hours on the room's clock; `off` before `on` runs past midnight, equal times are lit all day. */
export const lampHours = z.object({ on: clockTime, off: clockTime });
export type LampHours = z.infer<typeof lampHours>;

/** How a shelf is used from an instant on, until its next arrangement. */
export const shelfArrangement = z.object({
  from: instant,
  /** Empty when the shelf stays dark. */
  lampPlan: z.array(lampHours),
  isHeatMatOn: z.boolean(),
  /** A clear propagation cover keeps the air over the tray damp. */
  isCovered: z.boolean(),
  /** Leaf area that gives off water [m²]. */
  leafAreaM2: z.number().min(0).max(10),
});
export type ShelfArrangement = z.infer<typeof shelfArrangement>;

/** The lamp over a shelf. */
export const simulatedLamp = z.object({
  kind: z.enum(['whiteLed', 'fluorescent']),
  watts: z.number().positive(),
  /** At the canopy, when the lamp was new [µmol m⁻² s⁻¹]. */
  ppfdWhenNewUmolM2S: z.number().positive(),
  luxPerUmol: z.number().positive(),
  fittedAt: instant,
});
export type SimulatedLamp = z.infer<typeof simulatedLamp>;

/** A shelf as the room model needs it. */
export const simulatedShelf = z.object({
  label: z.string().min(1),
  /** 0 is the top tier, where the warm air gathers. */
  tier: z.number().int().min(0),
  /** `cool` stands against an outer wall, `inner` away from it. */
  wall: z.enum(['inner', 'cool']),
  lamp: simulatedLamp.nullable(),
  heatMatWatts: z.number().positive().nullable(),
  arrangements: z.array(shelfArrangement).min(1),
});
export type SimulatedShelf = z.infer<typeof simulatedShelf>;

/** A sensor of a simulated device; `key` is the device's own name for it. */
export const simulatedSensor = z.object({
  key: z.string().min(1),
  quantity: z.enum(measuredQuantities),
  shelf: z.string().min(1),
  expectedIntervalSeconds: z.number().int().positive(),
});
export type SimulatedSensor = z.infer<typeof simulatedSensor>;

/** A device that the simulator plays, with the token that it reports with. */
export const simulatedDevice = z.object({
  id: z.string().min(1),
  name: z.string().min(1),
  token: z.string().min(1),
  sensors: z.array(simulatedSensor).min(1),
});
export type SimulatedDevice = z.infer<typeof simulatedDevice>;

/** A scenario over a span of time: something in the room's past, or started by a keeper. */
export const scenarioSpan = z.object({
  scenario: scenarioId,
  shelf: z.string().min(1),
  from: instant,
  to: instant,
  /** `timer-fails` only: whether the lamp stays dark or stays lit. */
  lamp: z.enum(['dark', 'lit']).optional(),
  /** `sensor-silent` and `sensor-drift` only: which sensors of the shelf; all of them when it is left out. */
  quantity: z.enum(measuredQuantities).optional(),
});
export type ScenarioSpan = z.infer<typeof scenarioSpan>;

/** The file that tells the simulator which room to play. The server writes it when it fills the demonstration. */
export const simulatedRoom = z
  .object({
    roomId: z.string().min(1),
    timeZone: z.string().min(1),
    latitudeDeg: z.number().min(-90).max(90),
    longitudeDeg: z.number().min(-180).max(180),
    shelves: z.array(simulatedShelf).min(1),
    devices: z.array(simulatedDevice).min(1),
    /** What went wrong in the past, oldest first. */
    story: z.array(scenarioSpan),
  })
  .superRefine((room, context) => {
    const labels = new Set(room.shelves.map((shelf) => shelf.label));
    const sensors = room.devices.flatMap((device) => device.sensors);
    for (const { shelf } of [...sensors, ...room.story]) {
      if (!labels.has(shelf)) context.addIssue({ code: 'custom', message: `no shelf ${shelf} in this room` });
    }
  });
export type SimulatedRoom = z.infer<typeof simulatedRoom>;

/** Starts a scenario now. */
export const startScenarioRequest = z.object({
  scenario: scenarioId,
  shelf: z.string().min(1),
  minutes: z
    .number()
    .positive()
    .max(7 * 24 * 60),
  lamp: scenarioSpan.shape.lamp,
  quantity: scenarioSpan.shape.quantity,
});
export type StartScenarioRequest = z.infer<typeof startScenarioRequest>;

/** A scenario that has been started, with the name by which it can be stopped. */
export const scenarioRun = scenarioSpan.extend({ run: z.string().min(1) });
export type ScenarioRun = z.infer<typeof scenarioRun>;

/** One scenario as a keeper chooses it. */
export const scenarioDescription = z.object({
  scenario: scenarioId,
  title: z.string(),
  description: z.string(),
  /** Names of the fields of {@link startScenarioRequest} that it takes. */
  parameters: z.array(z.enum(['shelf', 'minutes', 'lamp', 'quantity'])),
});
export type ScenarioDescription = z.infer<typeof scenarioDescription>;

/** Which scenarios there are, which run, and what the room's clock says. */
export const scenarioListResponse = z.object({
  roomTime: instant,
  scenarios: z.array(scenarioDescription),
  running: z.array(scenarioRun),
});
export type ScenarioListResponse = z.infer<typeof scenarioListResponse>;

/** Header that carries the secret shared by the server and the simulator. */
export const simulatorSecretHeader = 'x-simulator-secret';
