import { settle, type Exchange } from './exchange';
import type { ShelfDisturbance } from './disturbance';
import { HEAT_OF_AIR_J_G_K, HEAT_OF_EVAPORATION_J_G, humidityRatioAtSaturationKgKg } from './moist-air';
import type { OutdoorAir } from './weather';

/** What changes on a shelf from minute to minute. */
export interface ShelfState {
  readonly airC: number;
  readonly humidityRatioKgKg: number;
  readonly rootZoneC: number;
  /** Water standing on mix, trays and leaves after watering [g]. */
  readonly surfaceWaterG: number;
  readonly isLampLit: boolean;
  readonly isMatHeating: boolean;
}

/** What a shelf is under at one step: its arrangement, resolved for this minute, and the air around it. */
export interface ShelfSurroundings {
  readonly roomC: number;
  readonly roomHumidityRatioKgKg: number;
  readonly outdoor: OutdoorAir;
  readonly tier: number;
  readonly isAtCoolWall: boolean;
  readonly isCovered: boolean;
  readonly leafAreaM2: number;
  readonly isLampPlanned: boolean;
  readonly lampWatts: number;
  readonly isMatPlanned: boolean;
  readonly matWatts: number;
  /** Water just poured [g]. */
  readonly pouredG: number;
}

/** What a shelf gives back to the room: heat and water carried away by the air that passes it. */
export interface ShelfOutflow {
  /** Conductance for heat [W K⁻¹] and for water [g s⁻¹ of dry air]. */
  readonly heatWK: number;
  readonly airGS: number;
  /** Lamp heat that goes straight to the room [W]. */
  readonly lampHeatW: number;
}

// Chosen so that an ordinary day of the demonstration's shelves is what their plants want; no source.
const OPEN_AIR_GS = 9;
const COVERED_AIR_GS = 0.13;
const COVERED_HEAT_WK = 4;
const BAY_HEAT_J_K = 4500;
const BAY_AIR_G = 350;
const COVERED_AIR_G = 120;
const TRAY_HEAT_J_K = 42_000;
const TRAY_HEAT_WK = 2.6;
const COOL_WALL_WK = 2.3;
const WARMTH_PER_TIER_C = 0.35;
const LOWEST_TIER = 3;
const LAMP_HEAT_TO_BAY = 0.72;
const MAT_TO_ROOT_ZONE = 0.85;
const MAT_SETTING_C = 27;
const MAT_DIFFERENTIAL_C = 0.4;
/** Stomata and boundary layer at work, a third of that in the dark [g s⁻¹ m⁻² per kg/kg]. */
const LEAF_GS_M2 = 1.15;
const DARK_LEAF_SHARE = 0.33;
/** Light taken up by a leaf as heat [J µmol⁻¹] and its exchange with the air from both faces. */
const ABSORBED_J_UMOL = 0.18;
const LEAF_TO_AIR_WM2K = 20;
const OPEN_MIX_GS = 0.25;
const COVERED_MIX_GS = 0.45;
const WET_SURFACE_GS = 0.8;
const WET_SURFACE_FULL_G = 60;
const COVER_CONDENSING_GS = 5;
const COVER_NEARNESS_TO_ROOM = 0.6;
const POURED_WATER_C = 15;
const HEAT_OF_WATER_J_G_K = 4.19;

/**
 * Carries one shelf through one step.
 *
 * @param shelf - The state at its start.
 * @param around - What surrounds the shelf, held still for the step.
 * @param disturbance - What is done to it.
 * @param seconds - Length of the step.
 * @returns The state at its end, and what the shelf passes on to the room.
 */
export function stepShelf(
  shelf: ShelfState,
  around: ShelfSurroundings,
  disturbance: ShelfDisturbance,
  seconds: number,
): { readonly state: ShelfState; readonly outflow: ShelfOutflow } {
  const isLampLit = lampState(around.isLampPlanned, disturbance);
  const lampW = isLampLit ? around.lampWatts : 0;
  const isMatHeating = matState(shelf, around, disturbance);
  const matW = isMatHeating ? around.matWatts : 0;
  const airGS = around.isCovered ? COVERED_AIR_GS : OPEN_AIR_GS;
  const heatWK = around.isCovered ? COVERED_HEAT_WK : OPEN_AIR_GS * HEAT_OF_AIR_J_G_K;

  const leafGS = around.leafAreaM2 * LEAF_GS_M2 * (isLampLit ? 1 : DARK_LEAF_SHARE);
  const wetGS = WET_SURFACE_GS * Math.min(1, shelf.surfaceWaterG / WET_SURFACE_FULL_G);
  const mixGS = around.isCovered ? COVERED_MIX_GS : OPEN_MIX_GS;
  const saturatedAtAir = humidityRatioAtSaturationKgKg(shelf.airC);
  const saturatedAtRoots = humidityRatioAtSaturationKgKg(shelf.rootZoneC);
  const water: Exchange[] = [
    [airGS, around.roomHumidityRatioKgKg],
    [leafGS, saturatedAtAir],
    [wetGS, saturatedAtAir],
    [mixGS, saturatedAtRoots],
    [disturbance.draughtGS, around.outdoor.humidityRatioKgKg],
  ];
  if (around.isCovered) {
    const coverC = COVER_NEARNESS_TO_ROOM * around.roomC + (1 - COVER_NEARNESS_TO_ROOM) * shelf.airC;
    const saturatedAtCover = humidityRatioAtSaturationKgKg(coverC);
    if (shelf.humidityRatioKgKg > saturatedAtCover) water.push([COVER_CONDENSING_GS, saturatedAtCover]);
  }
  const humidityRatioKgKg = Math.min(
    saturatedAtAir,
    settle(shelf.humidityRatioKgKg, around.isCovered ? COVERED_AIR_G : BAY_AIR_G, seconds, water),
  );

  const dryingKgKg = Math.max(0, saturatedAtAir - humidityRatioKgKg);
  const surfaceWaterG = Math.max(0, shelf.surfaceWaterG - wetGS * dryingKgKg * seconds) + around.pouredG;
  const latentW = (leafGS + wetGS) * dryingKgKg * HEAT_OF_EVAPORATION_J_G;

  const airC = settle(
    shelf.airC,
    BAY_HEAT_J_K,
    seconds,
    [
      [heatWK, around.roomC + WARMTH_PER_TIER_C * (LOWEST_TIER / 2 - around.tier)],
      [TRAY_HEAT_WK, shelf.rootZoneC],
      [around.isAtCoolWall ? COOL_WALL_WK : 0, around.outdoor.temperatureC],
      [disturbance.draughtGS * HEAT_OF_AIR_J_G_K, around.outdoor.temperatureC],
    ],
    lampW * LAMP_HEAT_TO_BAY + disturbance.extraHeatW - latentW,
  );
  const chilledC = around.pouredG * HEAT_OF_WATER_J_G_K * (shelf.rootZoneC - POURED_WATER_C);
  const rootZoneC = settle(
    shelf.rootZoneC - chilledC / TRAY_HEAT_J_K,
    TRAY_HEAT_J_K,
    seconds,
    [[TRAY_HEAT_WK, shelf.airC]],
    matW * MAT_TO_ROOT_ZONE,
  );

  return {
    state: { airC, humidityRatioKgKg, rootZoneC, surfaceWaterG, isLampLit, isMatHeating },
    outflow: { heatWK, airGS, lampHeatW: lampW * (1 - LAMP_HEAT_TO_BAY) },
  };
}

/**
 * Temperature of the leaves: warmed by the lamp's light, cooled by what they evaporate.
 *
 * @param shelf - The shelf's air.
 * @param ppfdUmolM2S - Light at the canopy [µmol m⁻² s⁻¹].
 */
export function leafTemperatureC(shelf: ShelfState, ppfdUmolM2S: number): number {
  const leafGSM2 = LEAF_GS_M2 * (shelf.isLampLit ? 1 : DARK_LEAF_SHARE);
  const dryingKgKg = Math.max(0, humidityRatioAtSaturationKgKg(shelf.airC) - shelf.humidityRatioKgKg);
  const netWM2 = ppfdUmolM2S * ABSORBED_J_UMOL - leafGSM2 * dryingKgKg * HEAT_OF_EVAPORATION_J_G;
  return shelf.airC + netWM2 / LEAF_TO_AIR_WM2K;
}

function lampState(isPlanned: boolean, { lamp }: ShelfDisturbance): boolean {
  return lamp === 'timer' ? isPlanned : lamp === 'lit';
}

function matState(shelf: ShelfState, around: ShelfSurroundings, disturbance: ShelfDisturbance): boolean {
  if (disturbance.isHeatMatStuckOn) return true;
  if (!around.isMatPlanned) return false;
  const threshold = MAT_SETTING_C + (shelf.isMatHeating ? MAT_DIFFERENTIAL_C : -MAT_DIFFERENTIAL_C);
  return shelf.rootZoneC < threshold;
}
