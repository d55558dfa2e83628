import {
  FormControl,
  FormGroup,
  Validators,
  type AbstractControl,
  type ValidationErrors,
} from '@angular/forms';
import type { CareKind } from '@shared/care/care-kind';
import type { Routine, RoutineDraft, RoutineWho } from '@shared/contracts/care-routines';
import { placeKey, placeOf } from '../routine-groups';
import { fillTimingFields, timingFields, timingOf } from './timing-fields';

/** The fields of a routine. */
export type RoutineForm = ReturnType<typeof routineForm>;

const mostSteps = 20;
const longestStep = 200;
const text = (): FormControl<string> => new FormControl('', { nonNullable: true });
const wholeNumber = (value: number, least: number, most: number): FormControl<number> =>
  new FormControl(value, {
    nonNullable: true,
    validators: [
      Validators.required,
      Validators.min(least),
      Validators.max(most),
      Validators.pattern(/^\d+$/),
    ],
  });

/**
 * Empty fields of a routine. They carry the names of what is sent, so that each problem finds its field.
 *
 * @param today - The room's day, on which a new routine starts.
 */
export function routineForm(today: string) {
  return new FormGroup(
    {
      kind: new FormControl<CareKind>('water', { nonNullable: true }),
      title: new FormControl('', {
        nonNullable: true,
        validators: [Validators.required, Validators.pattern(/\S/)],
      }),
      detail: text(),
      /** A word of `placeKey`. */
      place: new FormControl('room', { nonNullable: true }),
      timing: timingFields(today),
      season: new FormGroup({
        isLimited: new FormControl(false, { nonNullable: true }),
        fromMonth: new FormControl(3, { nonNullable: true }),
        toMonth: new FormControl(10, { nonNullable: true }),
      }),
      windowDays: wholeNumber(0, 0, 60),
      /** One a line. */
      steps: new FormControl('', { nonNullable: true, validators: [fewShortLines] }),
      amount: text(),
      who: new FormGroup(
        {
          how: new FormControl<RoutineWho['how']>('onDuty', { nonNullable: true }),
          personId: new FormControl<string | null>(null),
          personIds: new FormControl<string[]>([], { nonNullable: true }),
        },
        { validators: [enoughPeople] },
      ),
      skipsClosedDays: new FormControl(false, { nonNullable: true }),
      minutes: wholeNumber(10, 1, 480),
    },
    { validators: [driesSomewhere] },
  );
}

/** Fills the fields with a routine as it is. */
export function fillRoutineForm(form: RoutineForm, routine: Routine): void {
  const { season, who, steps, place, timing, kind, title, detail, windowDays, amount } = routine;
  const { skipsClosedDays, minutes } = routine;
  form.patchValue({
    kind,
    title,
    detail,
    place: placeKey(place),
    season: season === null ? { isLimited: false } : { isLimited: true, ...season },
    windowDays,
    steps: steps.join('\n'),
    amount,
    who: {
      how: who.how,
      personId: who.how === 'person' ? who.personId : null,
      personIds: who.how === 'inTurn' || who.how === 'pair' ? who.personIds : [],
    },
    skipsClosedDays,
    minutes,
  });
  fillTimingFields(form.controls.timing, timing);
}

/** What is sent; null while something is missing. */
export function routineDraftOf(form: RoutineForm): RoutineDraft | null {
  const { kind, title, detail, place, season, windowDays, steps, amount, skipsClosedDays, minutes } =
    form.getRawValue();
  const [timing, who] = [timingOf(form.controls.timing), whoOf(form)];
  if (form.invalid || timing === null || who === null) return null;
  return {
    kind,
    title: title.trim(),
    detail: detail.trim(),
    place: placeOf(place),
    timing,
    season: season.isLimited ? { fromMonth: season.fromMonth, toMonth: season.toMonth } : null,
    windowDays,
    steps: linesOf(steps),
    amount: amount.trim(),
    who,
    skipsClosedDays,
    minutes,
  };
}

function whoOf({ controls }: RoutineForm): RoutineWho | null {
  const { how, personId, personIds } = controls.who.getRawValue();
  if (how === 'onDuty') return { how };
  if (how === 'person') return personId === null ? null : { how, personId };
  return { how, personIds };
}

function linesOf(typed: string): string[] {
  return typed
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '');
}

function fewShortLines({ value }: AbstractControl<string>): ValidationErrors | null {
  const lines = linesOf(value);
  if (lines.length > mostSteps) return { tooMany: true };
  return lines.some((line) => line.length > longestStep) ? { tooLong: true } : null;
}

function enoughPeople(group: AbstractControl): ValidationErrors | null {
  const { how, personId, personIds } = group.value as {
    how: RoutineWho['how'];
    personId: string | null;
    personIds: string[];
  };
  if (how === 'person') return personId === null ? { who: true } : null;
  if (how === 'pair') return personIds.length === 2 ? null : { who: true };
  return how === 'inTurn' && personIds.length < 2 ? { who: true } : null;
}

/** Each planting dries in its own way; a shelf or a room has no drying of its own. */
function driesSomewhere(form: AbstractControl): ValidationErrors | null {
  const { place, timing } = form.value as { place: string; timing: { how: string } };
  return timing.how === 'byDrying' && !place.startsWith('planting:') ? { drying: true } : null;
}
