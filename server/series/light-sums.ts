import type { MeasuredQuantity } from '@shared/climate/quantity';

/**
 * Light integral from the stored integral of a light sensor.
 *
 * @param integralMs - Integral of its readings over time [µmol m⁻² s⁻¹ · ms, or lx · ms].
 * @param quantity - What it measures.
 * @param luxPerUmol - Factor of the lamp above it, needed for lux.
 * @returns Light integral [mol m⁻²]; null for lux without a lamp's factor, or for no light sensor.
 */
export function dliMolM2(
  integralMs: number,
  quantity: MeasuredQuantity,
  luxPerUmol: number | null,
): number | null {
  const perS = integralMs / 1_000;
  if (quantity === 'ppfd') return perS / 1_000_000;
  // Turning lux into PPFD is linear, so the integral may be turned instead of each reading.
  if (quantity !== 'illuminance' || luxPerUmol === null) return null;
  return perS / luxPerUmol / 1_000_000;
}
