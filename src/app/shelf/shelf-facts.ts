import type { ShelfDetail } from '@shared/contracts/series';
import { formatNumber, formatValue } from '@shared/format/numbers';

/** Where a shelf is and what it has, in one line: "Rack A, top tier · 120 × 45 cm · lamp 46 W". */
export function shelfFacts({ shelf, rackName, tier, tiers }: ShelfDetail): string {
  const { widthCm, depthCm, lamps } = shelf;
  const parts = [`${rackName}, ${tierWords(tier, tiers)}`];
  if (widthCm !== null && depthCm !== null)
    parts.push(`${formatNumber(widthCm, 0)} × ${formatValue(depthCm, 'cm', 0)}`);
  const watts = lamps.reduce((sum, lamp) => sum + lamp.watts, 0);
  if (lamps.length > 0)
    parts.push(`${lamps.length === 1 ? 'lamp' : `${lamps.length} lamps`} ${formatValue(watts, 'W', 0)}`);
  return parts.join(' · ');
}

/** @param tier - From 1 at the top. */
function tierWords(tier: number, tiers: number): string {
  if (tiers === 1) return 'only tier';
  if (tier === 1) return 'top tier';
  return tier === tiers ? 'bottom tier' : `tier ${tier} of ${tiers}`;
}
