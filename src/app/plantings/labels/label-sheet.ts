import type { Planting } from '@shared/contracts/plantings';

/** A label as it is printed. */
export interface PlantLabelPrint {
  /** Tells copies apart. */
  readonly key: string;
  readonly plantingId: string;
  readonly crop: string;
  readonly variety: string | null;
  /** Such as "sown 21 Nov 2026". */
  readonly date: string;
}

/** How many labels of each planting are wanted, by its id. */
export type LabelCounts = Readonly<Record<string, number>>;

/** No more are printed of one planting at a time: a slip of the finger is no ream of paper. */
export const mostLabels = 60;

/**
 * The labels of a sheet, as many of each planting as are wanted, in the order of the list.
 *
 * @param day - Says a day of the calendar.
 */
export function labelSheet(
  plantings: readonly Planting[],
  counts: LabelCounts,
  day: (day: string) => string,
): readonly PlantLabelPrint[] {
  return plantings.flatMap((planting) =>
    Array.from({ length: labelCount(counts, planting.id) }, (_, copy) => ({
      key: `${planting.id} ${copy}`,
      plantingId: planting.id,
      crop: planting.crop,
      variety: planting.variety,
      date: `${planting.origin === 'sown' ? 'sown' : 'here since'} ${day(planting.startedOn)}`,
    })),
  );
}

/** How many are wanted of a planting: none unless said. */
export function labelCount(counts: LabelCounts, plantingId: string): number {
  return counts[plantingId] ?? 0;
}

/** The counts with another number for one planting, a whole one from none to the most. */
export function withCount(counts: LabelCounts, plantingId: string, count: number): LabelCounts {
  const whole = Number.isFinite(count) ? Math.trunc(count) : 0;
  return { ...counts, [plantingId]: Math.min(mostLabels, Math.max(0, whole)) };
}
