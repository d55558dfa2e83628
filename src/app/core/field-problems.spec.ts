import { FormControl, FormGroup } from '@angular/forms';
import { ApiFailure } from './api-failure';
import { serverWords, showFieldProblems } from './field-problems';

function refusal(...errors: { path: string; message: string }[]): ApiFailure {
  return new ApiFailure('invalid', {
    problem: { type: 'about:blank', title: 'Not as it is', status: 422, code: 'INVALID', errors },
  });
}

describe('what the server found wrong', () => {
  it('stands at the field it names until that field is changed', () => {
    const form = new FormGroup({ count: new FormControl(60) });
    const rest = showFieldProblems(form, refusal({ path: 'body.count', message: 'is more than is left' }));
    expect(rest).toBeNull();
    expect(serverWords(form.controls.count)).toBe('Is more than is left.');
    expect(form.invalid).toBe(true);
    expect(form.controls.count.touched).toBe(true);
    form.controls.count.setValue(20);
    expect(serverWords(form.controls.count)).toBeNull();
    expect(form.valid).toBe(true);
  });

  it('is said for the whole form where no field has that name', () => {
    const form = new FormGroup({ count: new FormControl(60) });
    expect(showFieldProblems(form, refusal({ path: 'body.shelfId', message: 'is of another room' }))).toBe(
      'Shelf id is of another room.',
    );
    expect(form.valid).toBe(true);
  });

  it('without fields is the failure in words', () => {
    expect(showFieldProblems(new FormGroup({}), new ApiFailure('offline'))).toContain('can’t be reached');
  });
});
