import {
  FormControl,
  FormGroup,
  Validators,
  type AbstractControl,
  type ValidationErrors,
} from '@angular/forms';
import { presetOf, ruleOf, type CalendarPreset } from '@shared/care/calendar-preset';
import { requireRule } from '@shared/care/recurrence';
import { weekdayOf } from '@shared/care/rota';
import type { RoutineTiming } from '@shared/contracts/care-routines';
import { DomainError } from '@shared/errors/domain-error';

/** A rhythm of the list, or a rule that somebody wrote. */
export type CalendarChoice = CalendarPreset['every'] | 'own';
/** The fields that say when. */
export type TimingForm = ReturnType<typeof timingFields>;

const number = (value: number, least: number, most: number): FormControl<number> =>
  new FormControl(value, {
    nonNullable: true,
    validators: [
      Validators.required,
      Validators.min(least),
      Validators.max(most),
      Validators.pattern(/^\d+$/),
    ],
  });
const choice = <T>(value: T): FormControl<T> => new FormControl(value, { nonNullable: true });

/**
 * Fields that say when: every three days by the calendar, unless something else is chosen.
 *
 * @param today - The room's day; lists that name a day begin with it.
 */
export function timingFields(today: string) {
  return new FormGroup({
    how: choice<RoutineTiming['how']>('calendar'),
    startsOn: new FormControl(today, { nonNullable: true, validators: [Validators.required] }),
    every: choice<CalendarChoice>('days'),
    interval: number(3, 1, 366),
    weekdays: choice<readonly number[]>([weekdayOf(today)]),
    monthDay: choice(Number(today.slice(8))),
    nth: choice(1),
    weekday: choice(weekdayOf(today)),
    yearMonth: choice(Number(today.slice(5, 7))),
    yearDay: number(Number(today.slice(8)), 1, 31),
    rule: new FormControl('FREQ=WEEKLY', { nonNullable: true, validators: [isRule] }),
    everyDays: number(4, 1, 366),
    fallbackDays: number(3, 1, 60),
  });
}

/** Fills the fields with when a routine is due. */
export function fillTimingFields(form: TimingForm, timing: RoutineTiming): void {
  const { how, startsOn } = timing;
  form.patchValue({ how, startsOn });
  if (timing.how === 'afterDoing') form.patchValue({ everyDays: timing.everyDays });
  else if (timing.how === 'byDrying') form.patchValue({ fallbackDays: timing.fallbackDays });
  else form.patchValue({ rule: timing.rule, ...fieldsOf(presetOf(timing.rule), startsOn) });
}

/** When it is due; null while a field that counts is not filled in as it should be. */
export function timingOf(form: TimingForm): RoutineTiming | null {
  const { how, startsOn, everyDays, fallbackDays } = form.getRawValue();
  if (countingFields(form).some(({ invalid }) => invalid)) return null;
  if (how === 'afterDoing') return { how, everyDays, startsOn };
  if (how === 'byDrying') return { how, fallbackDays, startsOn };
  return { how, rule: ruleFrom(form), startsOn };
}

/** Lets only those fields keep the form from being sent that are shown. */
export function mindShownFields(form: TimingForm): void {
  const counting = new Set<AbstractControl>(countingFields(form));
  for (const control of Object.values(form.controls)) {
    const mustMind = counting.has(control) || control === form.controls.how;
    if (mustMind && control.disabled) control.enable({ emitEvent: false });
    if (!mustMind && control.enabled) control.disable({ emitEvent: false });
  }
  form.updateValueAndValidity({ emitEvent: false });
}

function countingFields({ controls }: TimingForm): readonly FormControl[] {
  const { how, every, startsOn, interval, rule, everyDays, fallbackDays } = controls;
  if (how.value === 'afterDoing') return [startsOn, everyDays];
  if (how.value === 'byDrying') return [startsOn, fallbackDays];
  switch (every.value) {
    case 'days':
      return [startsOn, every, interval];
    case 'weeks':
      return [startsOn, every, interval, controls.weekdays];
    case 'monthDay':
      return [startsOn, every, interval, controls.monthDay];
    case 'monthWeekday':
      return [startsOn, every, interval, controls.nth, controls.weekday];
    case 'year':
      return [startsOn, every, controls.yearMonth, controls.yearDay];
    case 'own':
      return [startsOn, every, rule];
  }
}

function ruleFrom(form: TimingForm): string {
  const { every, interval, weekdays, monthDay, nth, weekday, yearMonth, yearDay, rule } = form.getRawValue();
  switch (every) {
    case 'days':
      return ruleOf({ every, interval });
    case 'weeks':
      return ruleOf({ every, interval, weekdays });
    case 'monthDay':
      return ruleOf({ every, interval, day: monthDay });
    case 'monthWeekday':
      return ruleOf({ every, interval, nth, weekday });
    case 'year':
      return ruleOf({ every, month: yearMonth, day: yearDay });
    case 'own':
      return rule.trim();
  }
}

function fieldsOf(preset: CalendarPreset | null, startsOn: string): Partial<TimingForm['value']> {
  if (preset === null) return { every: 'own' };
  const { every } = preset;
  switch (preset.every) {
    case 'days':
      return { every, interval: preset.interval };
    case 'weeks': {
      const weekdays = preset.weekdays.length > 0 ? preset.weekdays : [weekdayOf(startsOn)];
      return { every, interval: preset.interval, weekdays };
    }
    case 'monthDay':
      return { every, interval: preset.interval, monthDay: preset.day };
    case 'monthWeekday':
      return { every, interval: preset.interval, nth: preset.nth, weekday: preset.weekday };
    case 'year':
      return { every, yearMonth: preset.month, yearDay: preset.day };
  }
}

function isRule({ value }: AbstractControl<string>): ValidationErrors | null {
  try {
    requireRule(value.trim());
    return null;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { rule: error.message };
  }
}
