/**
 * Chance that can be asked for at any place: every value follows from a seed and the place alone, so an instant of
 * the model is the same however the run came to it.
 */

/** Mixes whole numbers into one of 32 bits: multiply and xor-shift rounds, finished as MurmurHash3 finishes (public domain). */
export function mix32(...words: readonly number[]): number {
  let hash = 0x9e3779b9;
  for (const word of words) {
    hash = Math.imul(hash ^ (word | 0), 0x85ebca6b);
    hash = (hash << 13) | (hash >>> 19);
  }
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
  return (hash ^ (hash >>> 16)) >>> 0;
}

/** A 32-bit number for a name (FNV-1a), to be mixed with a seed. */
export function hashOfName(name: string): number {
  let hash = 0x811c9dc5;
  for (let index = 0; index < name.length; index += 1) {
    hash = Math.imul(hash ^ name.charCodeAt(index), 0x01000193);
  }
  return hash >>> 0;
}

/** A number from 0 up to but not including 1. */
export function uniformAt(...words: readonly number[]): number {
  return mix32(...words) / 2 ** 32;
}

/** A number with mean 0 and standard deviation 1 (Box–Muller). */
export function gaussianAt(...words: readonly number[]): number {
  const radius = Math.sqrt(-2 * Math.log(1 - uniformAt(...words, 1)));
  return radius * Math.cos(2 * Math.PI * uniformAt(...words, 2));
}

/**
 * A curve without corners through random heights at whole positions.
 *
 * @param seed - Names the curve.
 * @param position - Any real number; one unit is the time from one height to the next.
 * @returns A value from -1 to 1; slope and curvature are continuous.
 */
export function smoothNoiseAt(seed: number, position: number): number {
  const left = Math.floor(position);
  const x = position - left;
  const blend = x * x * x * (x * (6 * x - 15) + 10);
  const from = uniformAt(seed, left);
  const to = uniformAt(seed, left + 1);
  return 2 * (from + (to - from) * blend) - 1;
}
