import { settle, type Exchange } from './exchange';
import { HEAT_OF_AIR_J_G_K, HEAT_OF_EVAPORATION_J_G, relativeHumidityPct } from './moist-air';
import type { ShelfOutflow, ShelfState } from './shelf-balance';
import type { OutdoorAir } from './weather';

/** What changes in the room's own air and walls from minute to minute. */
export interface RoomAirState {
  readonly airC: number;
  readonly humidityRatioKgKg: number;
  /** Walls and furniture, which make the room slow. */
  readonly wallsC: number;
  readonly radiatorW: number;
}

/** A shelf together with what it passes on. */
export interface ShelfPart {
  readonly state: ShelfState;
  readonly outflow: ShelfOutflow;
}

// A room of about 33 m³ with one radiator, one extractor and one window. Chosen, no source.
const AIR_HEAT_J_K = 260_000;
const WALLS_HEAT_J_K = 7_000_000;
const AIR_TO_WALLS_WK = 110;
const WALLS_TO_OUTDOORS_WK = 32;
// The walls take up and give back water, so that the air behaves like six times its mass.
const AIR_G = 40_000 * 6;
const LEAKAGE_GS = 8;
const RADIATOR_FULL_W = 1600;
const RADIATOR_BAND_C = 1.6;
const RADIATOR_LAG_S = 900;
const EXTRACTOR_FULL_GS = 55;
const EXTRACTOR_BAND_C = 2;
const EXTRACTOR_ABOVE_HEATING_C = 1;
// Someone opens the window wider as the room gets warmer than the extractor keeps it while the house is heated.
const WINDOW_FROM_C = 20.2;
const WINDOW_BAND_C = 1;
const WINDOW_FULL_GS = 200;
const DEHUMIDIFIER_FROM_PCT = 60;
const DEHUMIDIFIER_BAND_PCT = 14;
const DEHUMIDIFIER_FULL_GS = 0.09;
const DAY_C = 18.8;
const NIGHT_C = 15.8;
const DAY_STARTS_MINUTE = 5 * 60 + 30;
const NIGHT_STARTS_MINUTE = 22 * 60;

/** What the thermostat is set to at this minute of the room's day [°C]. */
export function heatingSetpointC(minute: number): number {
  return minute >= DAY_STARTS_MINUTE && minute < NIGHT_STARTS_MINUTE ? DAY_C : NIGHT_C;
}

/**
 * Carries the room's air through one step.
 *
 * @param room - The state at its start.
 * @param shelves - The shelves at its start, with what they pass on.
 * @param outdoor - The air outside.
 * @param minute - Minute of the room's day, for the thermostat.
 * @param draughtGS - Outdoor air let in beyond the usual [g s⁻¹].
 * @param seconds - Length of the step.
 */
export function stepRoomAir(
  room: RoomAirState,
  shelves: readonly ShelfPart[],
  outdoor: OutdoorAir,
  minute: number,
  draughtGS: number,
  seconds: number,
): RoomAirState {
  const setpointC = heatingSetpointC(minute);
  const wantedW = RADIATOR_FULL_W * share((setpointC - room.airC) / RADIATOR_BAND_C + 0.5);
  const radiatorW = settle(room.radiatorW, RADIATOR_LAG_S, seconds, [[1, wantedW]]);
  const isCoolerOutside = outdoor.temperatureC < room.airC;
  const extractedGS = isCoolerOutside
    ? EXTRACTOR_FULL_GS * share((room.airC - setpointC - EXTRACTOR_ABOVE_HEATING_C) / EXTRACTOR_BAND_C)
    : 0;
  const airedGS = isCoolerOutside ? WINDOW_FULL_GS * share((room.airC - WINDOW_FROM_C) / WINDOW_BAND_C) : 0;
  const freshGS = LEAKAGE_GS + extractedGS + airedGS + draughtGS;
  const humidityPct = relativeHumidityPct(room.airC, room.humidityRatioKgKg);
  const driedGS = DEHUMIDIFIER_FULL_GS * share((humidityPct - DEHUMIDIFIER_FROM_PCT) / DEHUMIDIFIER_BAND_PCT);

  const heat: Exchange[] = [
    [freshGS * HEAT_OF_AIR_J_G_K, outdoor.temperatureC],
    [AIR_TO_WALLS_WK, room.wallsC],
  ];
  const water: Exchange[] = [[freshGS, outdoor.humidityRatioKgKg]];
  let heatingW = radiatorW + driedGS * HEAT_OF_EVAPORATION_J_G;
  for (const { state, outflow } of shelves) {
    heat.push([outflow.heatWK, state.airC]);
    water.push([outflow.airGS, state.humidityRatioKgKg]);
    heatingW += outflow.lampHeatW;
  }

  return {
    airC: settle(room.airC, AIR_HEAT_J_K, seconds, heat, heatingW),
    humidityRatioKgKg: settle(room.humidityRatioKgKg, AIR_G, seconds, water, -driedGS),
    wallsC: settle(room.wallsC, WALLS_HEAT_J_K, seconds, [
      [AIR_TO_WALLS_WK, room.airC],
      [WALLS_TO_OUTDOORS_WK, outdoor.temperatureC],
    ]),
    radiatorW,
  };
}

function share(value: number): number {
  return Math.min(1, Math.max(0, value));
}
