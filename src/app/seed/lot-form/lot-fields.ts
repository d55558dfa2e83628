import {
  FormControl,
  FormGroup,
  Validators,
  type AbstractControl,
  type ValidationErrors,
} from '@angular/forms';
import type { addSeedLot, changeSeedLot, SeedLot, SeedUnit } from '@shared/contracts/seed';
import type * as z from 'zod';

/** Fields of a lot as they are typed; null where a number is left out. */
export type LotForm = ReturnType<typeof lotForm>;

const numberField = (least: number, most: number): FormControl<number | null> =>
  new FormControl<number | null>(null, { validators: [Validators.min(least), Validators.max(most)] });
const textField = (): FormControl<string> => new FormControl('', { nonNullable: true });
const mostAmount = 1_000_000;
const oldestYear = 1950;

/**
 * The fields of a lot.
 *
 * @param year - The room's year: nothing was packed later.
 */
export function lotForm(year: number) {
  return new FormGroup(
    {
      cropId: new FormControl<string | null>(null, { validators: [Validators.required] }),
      variety: textField(),
      source: textField(),
      packedYear: numberField(oldestYear, year),
      unit: new FormControl<SeedUnit>('seeds', { nonNullable: true }),
      amount: new FormControl<number | null>(null, {
        validators: [Validators.required, Validators.min(0.001), Validators.max(mostAmount)],
      }),
      seedsPerGram: numberField(0.001, mostAmount),
      price: numberField(0, mostAmount),
      currency: new FormControl('', { nonNullable: true, validators: [Validators.pattern(/^[A-Za-z]{3}$/)] }),
      lotNumber: textField(),
      note: textField(),
    },
    { validators: [pricedInSomething] },
  );
}

function pricedInSomething(form: AbstractControl): ValidationErrors | null {
  const { price, currency } = form.value as { price: number | null; currency: string };
  return price !== null && currency === '' ? { currency: true } : null;
}

/** Fills the fields with a lot as it is written; its crop and amount are not changed here. */
export function fillLotForm(form: LotForm, lot: SeedLot): void {
  form.setValue({
    cropId: lot.cropId,
    variety: lot.variety ?? '',
    source: lot.source,
    packedYear: lot.packedYear,
    unit: lot.unit,
    amount: lot.amount,
    seedsPerGram: lot.seedsPerGram,
    price: lot.price,
    currency: lot.currency ?? '',
    lotNumber: lot.lotNumber,
    note: lot.note,
  });
}

/** What is sent to change a lot. */
export function lotChange(form: LotForm): z.input<typeof changeSeedLot.body> {
  const { variety, source, packedYear, seedsPerGram, price, currency, lotNumber, note } = form.getRawValue();
  return {
    variety: variety.trim() === '' ? null : variety.trim(),
    source: source.trim(),
    packedYear,
    seedsPerGram,
    price,
    currency: price === null || currency === '' ? null : currency.toUpperCase(),
    lotNumber: lotNumber.trim(),
    note: note.trim(),
  };
}

/** What is sent to add a lot; null while crop or amount are missing. */
export function newLot(form: LotForm): z.input<typeof addSeedLot.body> | null {
  const { cropId, unit, amount } = form.getRawValue();
  if (cropId === null || amount === null) return null;
  const { variety, ...rest } = lotChange(form);
  return { ...rest, cropId, unit, amount, variety: variety ?? null };
}
