import type { SimulatedLamp } from '@shared/contracts/simulation';

const HOUR_MS = 3_600_000;
// A shelf's plan changes with what grows on it; a lamp's wear is counted at the usual fourteen hours a day, so that it
// follows from the calendar alone and live values join the history.
const USUAL_SHARE_LIT = 14 / 24;

/**
 * What is left of a lamp's light after hours of use.
 *
 * @param kind - LEDs fade to 90 % in 36 000 h; tubes lose a tenth in their first thousand hours and then slowly more.
 * @param hoursRun - Hours lit since new, at least 0.
 * @returns Share of the light when new, 0–1.
 *
 * @remarks
 * The first tenth of the tubes is told by a lighting consultant on an aquarium list (weak); the slow loss after it and the
 * LED's life are assumptions without a source.
 */
export function shareOfLightLeft(kind: SimulatedLamp['kind'], hoursRun: number): number {
  if (kind === 'whiteLed') return Math.exp((Math.log(0.9) * hoursRun) / 36_000);
  return Math.max(0.5, 1 - 0.1 * (1 - Math.exp(-hoursRun / 350)) - (0.08 * hoursRun) / 4700);
}

/** Photosynthetic photon flux density at the canopy under the lit lamp [µmol m⁻² s⁻¹]. */
export function litPpfdUmolM2S(lamp: SimulatedLamp, at: number): number {
  const hoursRun = Math.max(0, ((at - Date.parse(lamp.fittedAt)) / HOUR_MS) * USUAL_SHARE_LIT);
  return lamp.ppfdWhenNewUmolM2S * shareOfLightLeft(lamp.kind, hoursRun);
}
