import { FormControl, FormGroup, Validators } from '@angular/forms';
import type { CareKind } from '@shared/care/care-kind';
import type { PersonOutcome } from '@shared/care/task-outcome';
import type { Completion } from '../../../core/care/care-deed';

/** What can be noted with a task, as far as its kind has it. */
export type CompletionForm = FormGroup<{
  millilitres: FormControl<number | null>;
  grams: FormControl<number | null>;
  count: FormControl<number | null>;
  plantingId: FormControl<string>;
  note: FormControl<string>;
}>;

/** Whether something is measured out at this kind of care. */
export function isPoured(kind: CareKind): boolean {
  return kind === 'water' || kind === 'feed';
}

/** An empty form within the limits of the contract. */
export function completionForm(): CompletionForm {
  const amount = [Validators.min(Number.MIN_VALUE), Validators.max(1_000_000)];
  return new FormGroup({
    millilitres: new FormControl<number | null>(null, amount),
    grams: new FormControl<number | null>(null, amount),
    count: new FormControl<number | null>(null, [
      Validators.min(0),
      Validators.max(100_000),
      Validators.pattern(/^\d+$/),
    ]),
    plantingId: new FormControl('', { nonNullable: true }),
    note: new FormControl('', { nonNullable: true, validators: Validators.maxLength(500) }),
  });
}

/**
 * What the form says of a task. Amounts go with what was done only.
 *
 * @param form - Valid.
 * @param outcome - What became of it.
 */
export function completionOf(form: CompletionForm, outcome: PersonOutcome): Completion {
  const { millilitres, grams, count, plantingId, note } = form.getRawValue();
  const said = note.trim() === '' ? {} : { note: note.trim() };
  if (outcome !== 'done') return { outcome, ...said };
  return {
    outcome,
    ...said,
    millilitres,
    grams,
    count,
    plantingId: plantingId === '' ? null : plantingId,
  };
}
