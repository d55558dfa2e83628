import { seedLot } from '../testing/seed-lot-builder';
import { fillLotForm, lotChange, lotForm, newLot } from './lot-fields';

const leeks = { cropId: 'leek', amount: 100 };

describe('the fields of a lot', () => {
  it('need a crop and an amount, and no more', () => {
    const form = lotForm(2026);
    expect(form.invalid).toBe(true);
    expect(newLot(form)).toBeNull();
    form.patchValue(leeks);
    expect(form.valid).toBe(true);
    expect(newLot(form)).toMatchObject({
      ...leeks,
      unit: 'seeds',
      variety: null,
      packedYear: null,
      price: null,
    });
  });

  it('take no packet of a year to come, and no amount of nothing', () => {
    const form = lotForm(2026);
    form.patchValue({ ...leeks, packedYear: 2027 });
    expect(form.controls.packedYear.invalid).toBe(true);
    form.patchValue({ packedYear: 2026, amount: 0 });
    expect(form.controls.packedYear.valid).toBe(true);
    expect(form.controls.amount.invalid).toBe(true);
  });

  it('want to know what a price is in; a gift costs nothing and still has one', () => {
    const form = lotForm(2026);
    form.patchValue({ ...leeks, price: 0 });
    expect(form.hasError('currency')).toBe(true);
    form.patchValue({ currency: 'eur' });
    expect(form.valid).toBe(true);
    expect(newLot(form)).toMatchObject({ price: 0, currency: 'EUR' });
  });

  it('give back a lot as it was written', () => {
    const form = lotForm(2026);
    const lot = seedLot({ note: 'Half price', variety: null, seedsPerGram: 380 });
    fillLotForm(form, lot);
    expect(lotChange(form)).toEqual({
      variety: null,
      source: lot.source,
      packedYear: 2024,
      seedsPerGram: 380,
      price: 2.8,
      currency: 'EUR',
      lotNumber: '17/4',
      note: 'Half price',
    });
  });

  it('drop a currency without a price', () => {
    const form = lotForm(2026);
    form.patchValue({ ...leeks, currency: 'EUR' });
    expect(newLot(form)).toMatchObject({ price: null, currency: null });
  });
});
