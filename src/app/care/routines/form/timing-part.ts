import { ChangeDetectionStrategy, Component, computed, effect, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { MatSelectModule } from '@angular/material/select';
import { monthNames, ordinal, weekdayNames } from '@shared/care/timing-words';
import { map, startWith, switchMap } from 'rxjs';
import { serverWords } from '../../../core/field-problems';
import { mindShownFields, type TimingForm } from './timing-fields';

const units = { days: 'days', weeks: 'weeks', monthDay: 'months', monthWeekday: 'months' };

/** Asks when a routine is due: by the calendar, after doing, or by drying. */
@Component({
  selector: 'app-timing-part',
  templateUrl: './timing-part.html',
  styleUrl: './routine-part.scss',
  imports: [MatFormFieldModule, MatInput, MatRadioModule, MatSelectModule, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TimingPart {
  readonly form = input.required<TimingForm>();
  /** It is about one planting, whose drying can be told. */
  readonly canDry = input(false);

  protected readonly said = serverWords;
  protected readonly months = monthNames.map((name, index) => ({ month: index + 1, name }));
  protected readonly weekdays = weekdayNames.map((name, index) => ({
    weekday: index + 1,
    name,
    short: name.slice(0, 2),
  }));
  protected readonly monthDays = [
    ...Array.from({ length: 31 }, (_, index) => ({ day: index + 1, word: ordinal(index + 1) })),
    { day: -1, word: 'last day' },
  ];
  protected readonly nths = [
    { nth: 1, word: 'first' },
    { nth: 2, word: 'second' },
    { nth: 3, word: 'third' },
    { nth: 4, word: 'fourth' },
    { nth: -1, word: 'last' },
  ];

  private readonly value = toSignal(
    toObservable(this.form).pipe(
      switchMap((form) =>
        form.valueChanges.pipe(
          startWith(null),
          map(() => form.getRawValue()),
        ),
      ),
    ),
  );
  protected readonly how = computed(() => this.value()?.how);
  protected readonly every = computed(() => this.value()?.every);
  protected readonly chosenDays = computed(() => this.value()?.weekdays ?? []);
  protected readonly isLateInMonth = computed(() => (this.value()?.monthDay ?? 0) > 28);
  protected readonly unit = computed(() => {
    const every = this.every();
    return every === undefined || every === 'year' || every === 'own' ? null : units[every];
  });

  constructor() {
    effect(() => {
      this.how();
      this.every();
      mindShownFields(this.form());
    });
  }

  protected toggle(weekday: number): void {
    const chosen = this.chosenDays();
    this.form().controls.weekdays.setValue(
      chosen.includes(weekday) ? chosen.filter((one) => one !== weekday) : [...chosen, weekday],
    );
  }
}
