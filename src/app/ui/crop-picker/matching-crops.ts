/** A crop as a field offers it. */
export interface PickedCrop {
  readonly id: string;
  readonly name: string;
  readonly botanicalName: string;
  readonly varieties: readonly string[];
}

/**
 * Crops that somebody may mean: every word typed is found in the name, the botanical name or a variety. Those whose
 * name begins with what was typed come first.
 */
export function matchingCrops<T extends PickedCrop>(crops: readonly T[], typed: string): readonly T[] {
  const words = typed.toLowerCase().split(/\s+/).filter(Boolean);
  const found = crops.filter(({ name, botanicalName, varieties }) => {
    const text = [name, botanicalName, ...varieties].join(' ').toLowerCase();
    return words.every((word) => text.includes(word));
  });
  const [first] = words;
  if (first === undefined) return found;
  const begins = ({ name }: T): number => (name.toLowerCase().startsWith(first) ? 0 : 1);
  return found.toSorted((one, other) => begins(one) - begins(other));
}
