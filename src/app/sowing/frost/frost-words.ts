import type { FrostWordingView } from '@shared/contracts/sowing';
import { frostRiskAt, type FrostSeason } from '@shared/growing/frost-date';
import { frostMeaning } from '@shared/growing/frost-words';

/** How a frost date can have been stated, with what it means for the reader. */
export const wordingChoices: readonly {
  readonly kind: FrostWordingView['kind'];
  readonly name: string;
  readonly help: string;
}[] = [
  {
    kind: 'probability',
    name: 'A chance of frost, as weather services print it',
    help: 'The chance that frost still comes after the date in spring, or has come before it in autumn. In spring a small number is a late, safe date.',
  },
  {
    kind: 'percentile',
    name: 'A percentile of the dates, as climate maps print it',
    help: 'The share of years whose last frost had already passed by the date, from early to late. In spring a large number is a late, safe date: the other way round.',
  },
  {
    kind: 'average',
    name: 'The average date',
    help: 'About half of the years have frost on the wrong side of it. For plants that frost kills, wait a week or two longer.',
  },
];

/**
 * What the fields say while they are filled in; null while the percentage is missing or none.
 *
 * @param kind - How the date was stated.
 * @param percent - As typed.
 */
export function statedRisk(
  kind: FrostWordingView['kind'],
  percent: number | null,
  season: FrostSeason,
): { readonly words: string; readonly isRisky: boolean } | null {
  const wording = wordingOf(kind, percent);
  if (wording === null) return null;
  const isRisky = season === 'spring' && (frostRiskAt(wording, season) ?? 0) > 0.5;
  return { words: frostMeaning(wording, season), isRisky };
}

/** A wording from its fields; null while it is not whole. */
export function wordingOf(kind: FrostWordingView['kind'], percent: number | null): FrostWordingView | null {
  if (kind === 'average') return { kind };
  if (percent === null || percent < 0 || percent > 100) return null;
  return { kind, percent };
}
