import { FormControl, FormGroup, Validators } from '@angular/forms';
import type { Crop } from '@shared/contracts/crops';
import type { newPlanting } from '@shared/contracts/plantings';
import type { SeedLot } from '@shared/contracts/seed';
import type * as z from 'zod';
import { typedInstant } from '../../core/room-instant';

/** How a planting begins. */
export type StartKind = 'sown' | 'broughtIn';
/** Stages in which plants are brought in. */
export type ArrivalStage = 'seedling' | 'growingOn' | 'fruiting' | 'resting';
/** The fields of a new planting. */
export type StartForm = ReturnType<typeof startForm>;

const most = 100_000;
const wholeNumber = Validators.pattern(/^\d+$/);
const text = (): FormControl<string> => new FormControl('', { nonNullable: true });

/** Empty fields of a new planting. */
export function startForm() {
  return new FormGroup({
    how: new FormControl<StartKind>('sown', { nonNullable: true }),
    /** Null for seed of no lot. */
    lotId: new FormControl<string | null>(null),
    cropId: new FormControl<string | null>(null, { validators: [Validators.required] }),
    variety: text(),
    count: new FormControl<number | null>(null, {
      validators: [Validators.required, Validators.min(1), Validators.max(most), wholeNumber],
    }),
    grams: new FormControl<number | null>(null, { validators: [Validators.min(0.0001)] }),
    depthMm: new FormControl<number | null>(null, { validators: [Validators.min(0), Validators.max(300)] }),
    stage: new FormControl<ArrivalStage>('growingOn', { nonNullable: true }),
    source: text(),
    shelfId: new FormControl<string | null>(null),
    container: text(),
    note: text(),
    at: text(),
  });
}

/** What is sent; null while crop or count are missing. */
export function startedPlanting(form: StartForm, zone: string): z.input<typeof newPlanting> | null {
  const { how, lotId, cropId, variety, count, grams, depthMm, stage, source, shelfId, container, note, at } =
    form.getRawValue();
  if (cropId === null || count === null) return null;
  const begun = {
    variety: variety.trim() === '' ? null : variety.trim(),
    shelfId,
    container: container.trim(),
    note: note.trim(),
    at: typedInstant(at, zone),
    count,
  };
  if (how === 'broughtIn') return { how, ...begun, cropId, stage, source: source.trim() };
  return {
    how,
    ...begun,
    lotId,
    grams: lotId === null ? null : grams,
    depthMm,
    ...(lotId === null ? { cropId } : {}),
  };
}

/** Where nobody can say how many grams the seeds make, they must be weighed. */
export function needsGrams(lot: SeedLot | null): boolean {
  return lot !== null && lot.unit === 'grams' && lot.seedsPerGram === null;
}

/** How deep to sow a crop. */
export interface DepthAdvice {
  /** Middle of what is published [mm], to begin with; null where there is no figure. */
  readonly depthMm: number | null;
  readonly words: string;
}

/** How deep a crop is sown, with who says so. */
export function depthAdvice(seed: Crop['seed']): DepthAdvice {
  const isLit = seed?.light?.value === 'needed';
  const lightWords = isLit ? ' It needs light: press it on, don’t cover it.' : '';
  const depth = seed?.depthMm ?? null;
  if (depth === null) return { depthMm: isLit ? 0 : null, words: `No published depth.${lightWords}` };
  const { low, high } = depth.value;
  return {
    depthMm: isLit ? low : Math.round((low + high) / 2),
    words: `${low === high ? low : `${low} to ${high}`} mm by ${depth.source}.${lightWords}`,
  };
}
