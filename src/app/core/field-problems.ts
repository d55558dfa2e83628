import type { AbstractControl, FormGroup } from '@angular/forms';
import { asApiFailure } from './api-failure';
import { failureText } from './failure-text';

const said = 'server';

/**
 * Puts what the server found wrong at the fields it names. An error stays until its field is changed.
 *
 * @param form - Its controls carry the names of the body's fields.
 * @param error - What the call threw.
 * @returns What remains to be said for the whole form; null when every problem stands at a field.
 */
export function showFieldProblems(form: FormGroup, error: unknown): string | null {
  const problems = asApiFailure(error).problem?.errors ?? [];
  const homeless = problems.filter(({ path, message }) => {
    const control = form.get(path.replace(/^body\./, ''));
    sayAt(control, sentence(message));
    return control === null;
  });
  if (problems.length > 0 && homeless.length === 0) return null;
  const [first] = homeless;
  return first === undefined ? failureText(error) : `${nameOf(first.path)} ${first.message}.`;
}

/** Says a sentence at a field. It stays until the field is changed. */
export function sayAt(control: AbstractControl | null, words: string): void {
  control?.setErrors({ [said]: words });
  control?.markAsTouched();
}

/** What the server said of a field; null when it found nothing wrong with it. */
export function serverWords(control: AbstractControl): string | null {
  const words: unknown = control.getError(said);
  return typeof words === 'string' ? words : null;
}

/** The server writes the end of a sentence that a field's name begins. */
function sentence(message: string): string {
  return `${message.charAt(0).toUpperCase()}${message.slice(1)}.`;
}

/** "body.shelfId" as words: "Shelf id". */
function nameOf(path: string): string {
  const words = path.replace(/^body\./, '').replace(/([A-Z])/g, ' $1');
  return words.charAt(0).toUpperCase() + words.slice(1).toLowerCase();
}
