import { completionForm, completionOf } from './completion-fields';

describe('what is noted with a task', () => {
  it('is nothing when nothing was filled in', () => {
    expect(completionOf(completionForm(), 'done')).toEqual({
      outcome: 'done',
      millilitres: null,
      grams: null,
      count: null,
      plantingId: null,
    });
  });

  it('has amounts only where it was done', () => {
    const form = completionForm();
    form.patchValue({ grams: 120, note: ' too small ' });
    expect(completionOf(form, 'done')).toMatchObject({ grams: 120, note: 'too small' });
    expect(completionOf(form, 'couldNot')).toEqual({ outcome: 'couldNot', note: 'too small' });
  });

  it.each([
    ['millilitres', 0, false],
    ['millilitres', 0.5, true],
    ['grams', 1_000_001, false],
    ['count', 0, true],
    ['count', 1.5, false],
    ['count', 100_001, false],
  ] as const)('takes %s of %p: %p', (field, value, isValid) => {
    const form = completionForm();
    form.controls[field].setValue(value);
    expect(form.valid).toBe(isValid);
  });
});
