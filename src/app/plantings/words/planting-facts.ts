import type { Planting } from '@shared/contracts/plantings';
import { plantingWords } from '../../core/planting-words';
import { formatNumber, formatValue } from '@shared/format/numbers';
import type { PlantingStage } from '@shared/growing/planting-stage';

/** What each stage is called on a screen. */
export const stageNames: Readonly<Record<PlantingStage, string>> = {
  sown: 'Sown',
  emerging: 'Coming up',
  seedling: 'Seedlings',
  growingOn: 'Growing on',
  fruiting: 'Flowering or fruiting',
  resting: 'Resting',
  hardeningOff: 'Hardening off',
  out: 'Planted out',
  ended: 'Ended',
};

/** Stage and age: "Sown 21 Nov", "Seedlings · day 24"; what has ended, since when. */
export function standingWords(planting: Planting, today: string): string {
  const words = plantingWords(planting, today);
  switch (planting.stage) {
    case 'sown':
    case 'emerging':
    case 'resting':
      return words.charAt(0).toUpperCase() + words.slice(1);
    case 'out':
    case 'ended':
      return words.replace(/^out/, stageNames[planting.stage]);
    default:
      return `${stageNames[planting.stage]} · ${words}`;
  }
}

/** A planting by crop and variety: "Leek Winter Piper". */
export function plantingTitle({ crop, variety }: Pick<Planting, 'crop' | 'variety'>): string {
  return [crop, variety].filter((part) => part !== null).join(' ');
}

/** How many there are: "40 seeds", "12 of 40 up", "6 plants". */
export function countWords({
  stage,
  sown,
  up,
  count,
}: Pick<Planting, 'stage' | 'sown' | 'up' | 'count'>): string {
  if (stage === 'sown') return count === 1 ? '1 seed' : `${formatNumber(count, 0)} seeds`;
  if (stage === 'emerging' && sown !== null && up !== null) return `${up} of ${sown} up`;
  return plantWords(count);
}

/** "1 plant", "6 plants". */
export function plantWords(count: number): string {
  return count === 1 ? '1 plant' : `${formatNumber(count, 0)} plants`;
}

/** What was harvested so far: "1.24 kg and 30 pieces"; null when nothing was. */
export function harvestWords({
  harvestedGrams,
  harvestedCount,
}: Pick<Planting, 'harvestedGrams' | 'harvestedCount'>): string | null {
  const parts = [
    ...(harvestedGrams > 0 ? [weightWords(harvestedGrams)] : []),
    ...(harvestedCount > 0 ? [pieceWords(harvestedCount)] : []),
  ];
  return parts.length === 0 ? null : parts.join(' and ');
}

/** "85 g", "1.24 kg". */
export function weightWords(grams: number): string {
  return grams < 1000 ? formatValue(grams, 'g', 0) : formatValue(grams / 1000, 'kg', 2);
}

/** "600 ml", "1.2 L". */
export function volumeWords(millilitres: number): string {
  return millilitres < 1000 ? formatValue(millilitres, 'ml', 0) : formatValue(millilitres / 1000, 'L', 1);
}

/** "1 piece", "30 pieces". */
export function pieceWords(count: number): string {
  return count === 1 ? '1 piece' : `${formatNumber(count, 0)} pieces`;
}

/** Where a planting stands. */
export function placeWords({ shelfLabel, stage }: Pick<Planting, 'shelfLabel' | 'stage'>): string {
  if (shelfLabel !== null) return `shelf ${shelfLabel}`;
  return stage === 'out' ? 'outdoors' : 'on no shelf';
}
