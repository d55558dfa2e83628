import type { SimulatedRoom } from '@shared/contracts/simulation';
import { calmShelf, type RoomDisturbance } from './disturbance';
import { litPpfdUmolM2S } from './lamp';
import { humidityRatioAtSaturationKgKg, relativeHumidityPct } from './moist-air';
import { RoomClock, type WallTime } from './room-clock';
import { heatingSetpointC, stepRoomAir, type RoomAirState } from './room-balance';
import { leafTemperatureC, stepShelf, type ShelfState, type ShelfSurroundings } from './shelf-balance';
import { ShelfPlan } from './shelf-plan';
import { outdoorAirAt, type Climate, type OutdoorAir } from './weather';

/** Length of a step of the model. Steps lie on whole minutes, so that any two runs share them. */
export const STEP_MS = 60_000;
/** Time that the model runs before the first instant asked for; its slowest store, the walls, forgets half in a day. */
export const SPIN_UP_MS = 12 * 24 * 3_600_000;

/** The parts of a room's description that its physics needs. */
export type RoomPlan = Pick<SimulatedRoom, 'timeZone' | 'latitudeDeg' | 'longitudeDeg' | 'shelves'>;

/** What a perfect instrument would find on a shelf. */
export interface ShelfClimate {
  readonly airC: number;
  readonly rootZoneC: number;
  readonly leafC: number;
  readonly humidityRatioKgKg: number;
  readonly relativeHumidityPct: number;
  readonly ppfdUmolM2S: number;
  readonly illuminanceLx: number;
  readonly isLampLit: boolean;
  readonly isMatHeating: boolean;
}

interface PlannedShelf {
  readonly plan: ShelfPlan;
  readonly state: ShelfState;
}

/**
 * The growing room: outdoor weather, the room's heat and water, and every shelf's, minute by minute.
 *
 * The same plan, seed and disturbances give the same values at the same instants, apart from what is left of the first
 * guess after {@link SPIN_UP_MS}: less than a thousandth of it.
 */
export class RoomModel {
  private readonly clock: RoomClock;
  private readonly climate: Climate;
  private minuteAt: number;
  private room: RoomAirState;
  private shelves: readonly PlannedShelf[];

  /**
   * @param plan - The room and its shelves.
   * @param seed - Which of all possible weathers it has; a whole number.
   * @param startAt - First instant that will be asked for, milliseconds since 1970 UTC.
   * @param disturbanceAt - What is done to the room at an instant.
   */
  constructor(
    plan: RoomPlan,
    seed: number,
    startAt: number,
    private readonly disturbanceAt: (at: number) => RoomDisturbance,
  ) {
    this.clock = new RoomClock(plan.timeZone);
    this.climate = { seed, latitudeDeg: plan.latitudeDeg, longitudeDeg: plan.longitudeDeg };
    this.minuteAt = Math.floor((startAt - SPIN_UP_MS) / STEP_MS) * STEP_MS;
    const outdoor = outdoorAirAt(this.climate, this.minuteAt);
    this.room = firstGuessOfRoom(outdoor, this.clock.wallTimeAt(this.minuteAt).minute);
    const state = firstGuessOfShelf(this.room);
    this.shelves = plan.shelves.map((shelf) => ({ plan: new ShelfPlan(shelf), state }));
    this.advanceTo(startAt);
  }

  /** Start of the minute that the model stands at, milliseconds since 1970 UTC. */
  get at(): number {
    return this.minuteAt;
  }

  /** Outdoor air at the model's minute. */
  get outdoor(): OutdoorAir {
    return outdoorAirAt(this.climate, this.minuteAt);
  }

  /** The room's own air at the model's minute. */
  get roomAir(): RoomAirState {
    return this.room;
  }

  /** Runs the model up to the minute of an instant; an instant in the past changes nothing. */
  advanceTo(at: number): void {
    while (this.minuteAt + STEP_MS <= at) this.step();
  }

  /**
   * What a perfect instrument would find on a shelf in the model's minute.
   *
   * @throws RangeError when the room has no such shelf.
   */
  climateOf(label: string): ShelfClimate {
    const found = this.shelves.find(({ plan }) => plan.shelf.label === label);
    if (found === undefined) throw new RangeError(`the room has no shelf ${label}`);
    const { state } = found;
    const { lamp } = found.plan.shelf;
    const ppfdUmolM2S = lamp !== null && state.isLampLit ? litPpfdUmolM2S(lamp, this.minuteAt) : 0;
    return {
      airC: state.airC,
      rootZoneC: state.rootZoneC,
      leafC: leafTemperatureC(state, ppfdUmolM2S),
      humidityRatioKgKg: state.humidityRatioKgKg,
      relativeHumidityPct: relativeHumidityPct(state.airC, state.humidityRatioKgKg),
      ppfdUmolM2S,
      illuminanceLx: lamp === null ? 0 : ppfdUmolM2S * lamp.luxPerUmol,
      isLampLit: state.isLampLit,
      isMatHeating: state.isMatHeating,
    };
  }

  private step(): void {
    // Timers, thermostat and weather are those at the end of the step, so that a lamp planned for 06:00 is lit at 06:00.
    const at = this.minuteAt + STEP_MS;
    const seconds = STEP_MS / 1000;
    const outdoor = outdoorAirAt(this.climate, at);
    const disturbance = this.disturbanceAt(at);
    const wallTime = this.clock.wallTimeAt(at);
    const stepped = this.shelves.map(({ plan, state }) => {
      const around = this.surroundingsOf(plan, outdoor, at, wallTime);
      const done = disturbance.shelves.get(plan.shelf.label) ?? calmShelf;
      return { plan, ...stepShelf(state, around, done, seconds) };
    });
    this.room = stepRoomAir(this.room, stepped, outdoor, wallTime.minute, disturbance.draughtGS, seconds);
    this.shelves = stepped;
    this.minuteAt = at;
  }

  private surroundingsOf(
    plan: ShelfPlan,
    outdoor: OutdoorAir,
    at: number,
    wallTime: WallTime,
  ): ShelfSurroundings {
    const arrangement = plan.arrangementAt(at);
    return {
      roomC: this.room.airC,
      roomHumidityRatioKgKg: this.room.humidityRatioKgKg,
      outdoor,
      tier: plan.shelf.tier,
      isAtCoolWall: plan.shelf.wall === 'cool',
      isCovered: arrangement.isCovered,
      leafAreaM2: arrangement.leafAreaM2,
      isLampPlanned: plan.isLampPlanned(arrangement, wallTime),
      lampWatts: plan.shelf.lamp?.watts ?? 0,
      isMatPlanned: arrangement.isHeatMatOn,
      matWatts: plan.shelf.heatMatWatts ?? 0,
      pouredG: plan.pouredG(arrangement, wallTime),
    };
  }
}

function firstGuessOfRoom(outdoor: OutdoorAir, minute: number): RoomAirState {
  const airC = Math.max(heatingSetpointC(minute), outdoor.temperatureC + 4);
  return {
    airC,
    humidityRatioKgKg: 0.6 * humidityRatioAtSaturationKgKg(airC),
    wallsC: 0.7 * airC + 0.3 * outdoor.temperatureC,
    radiatorW: 0,
  };
}

function firstGuessOfShelf({ airC, humidityRatioKgKg }: RoomAirState): ShelfState {
  return {
    airC,
    humidityRatioKgKg,
    rootZoneC: airC,
    surfaceWaterG: 0,
    isLampLit: false,
    isMatHeating: false,
  };
}
