import { COMMON_PRACTICE, FROM_MEMORY } from '@shared/growing/crops/figure';

/** Who says a figure, in a sentence; honest where nobody published it. */
export function sourceWords(source: string): string {
  if (source === COMMON_PRACTICE) return 'Common practice among growers; no published source was found.';
  if (source === FROM_MEMORY) return 'From memory: published somewhere, but it could not be looked up.';
  return `Source: ${source.replace(/\.$/, '')}.`;
}
