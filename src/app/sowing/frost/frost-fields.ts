import { FormControl, FormGroup } from '@angular/forms';
import { frostDatesEntry, type FrostDates, type FrostWordingView } from '@shared/contracts/sowing';
import { wordingOf } from './frost-words';
import type * as z from 'zod';

/** The fields of one frost date. */
export type FrostDateForm = ReturnType<typeof frostDateForm>;
/** The fields of both. */
export type FrostForm = ReturnType<typeof frostForm>;

const monthDays = [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;
const usualPercent = 50;

type StoredDate = FrostDates['lastSpring'];

/** The fields of the frost dates as they are. */
export function frostForm({ lastSpring, firstAutumn, note }: FrostDates) {
  return new FormGroup({
    lastSpring: frostDateForm(lastSpring),
    firstAutumn: frostDateForm(firstAutumn),
    note: new FormControl(note, { nonNullable: true }),
  });
}

function frostDateForm(date: StoredDate) {
  const wording = date?.wording ?? null;
  return new FormGroup({
    /** Day of the month; null for a date that is not known. */
    day: new FormControl<number | null>(date === null ? null : Number(date.on.slice(3))),
    /** 1 to 12. */
    month: new FormControl<number | null>(date === null ? null : Number(date.on.slice(0, 2))),
    kind: new FormControl<FrostWordingView['kind']>(wording?.kind ?? 'probability', { nonNullable: true }),
    percent: new FormControl<number | null>(
      wording === null || wording.kind === 'average' ? usualPercent : wording.percent,
    ),
  });
}

/** What is wrong with a frost date, in a sentence; null when it is whole, or left out. */
export function frostProblem(form: FrostDateForm, name: string): string | null {
  const { day, month, kind, percent } = form.getRawValue();
  if (day === null && month === null) return null;
  if (day === null || month === null) return `${name}: give both day and month, or neither.`;
  const longest = monthDays[month - 1] ?? 0;
  if (!Number.isInteger(day) || day < 1 || day > longest) return `${name}: that month has no day ${day}.`;
  return wordingOf(kind, percent) === null ? `${name}: the percentage is from 0 to 100.` : null;
}

/** What is saved. Only for fields without a {@link frostProblem}. */
export function savedFrost(form: FrostForm): z.input<typeof frostDatesEntry> {
  const { lastSpring, firstAutumn, note } = form.controls;
  return { lastSpring: savedDate(lastSpring), firstAutumn: savedDate(firstAutumn), note: note.value.trim() };
}

function savedDate(form: FrostDateForm): StoredDate {
  const { day, month, kind, percent } = form.getRawValue();
  const wording = wordingOf(kind, percent);
  if (day === null || month === null || wording === null) return null;
  return { on: `${twoDigits(month)}-${twoDigits(day)}`, wording };
}

function twoDigits(number: number): string {
  return String(number).padStart(2, '0');
}
