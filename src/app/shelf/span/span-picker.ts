import { ChangeDetectionStrategy, Component, computed, effect, input, output, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { ProblemText } from '../../ui/states/problem-text';
import { choiceOf, rollingSpans, type RollingSpan, type SpanChoice } from './shelf-span';

const labels: Readonly<Record<RollingSpan, string>> = {
  day: 'Day',
  week: 'Week',
  month: 'Month',
  season: 'Season',
};

/** Chooses the span that is looked at. */
@Component({
  selector: 'app-span-picker',
  templateUrl: './span-picker.html',
  styleUrl: './span-picker.scss',
  imports: [MatButton, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SpanPicker {
  readonly choice = input.required<SpanChoice>();
  /** The room's day, `YYYY-MM-DD`: the last that can be chosen; null while it isn't known. */
  readonly today = input<string | null>(null);
  /** The day of the first reading; null when there is none. */
  readonly firstDay = input<string | null>(null);
  readonly chosen = output<SpanChoice>();

  protected readonly rolling = rollingSpans.map((kind) => ({ kind, label: labels[kind] }));
  protected readonly hasDates = computed(() => this.choice().kind === 'dates');
  protected readonly isPicking = signal(false);
  protected readonly problem = signal<string | null>(null);
  protected readonly dates = new FormGroup({
    from: new FormControl('', { nonNullable: true }),
    to: new FormControl('', { nonNullable: true }),
  });

  constructor() {
    effect(() => {
      const choice = this.choice();
      if (choice.kind === 'dates') this.dates.setValue({ from: choice.firstDay, to: choice.lastDay });
    });
  }

  protected choose(kind: RollingSpan): void {
    this.isPicking.set(false);
    this.chosen.emit({ kind });
  }

  protected pick(): void {
    this.problem.set(null);
    this.isPicking.update((isPicking) => !isPicking);
  }

  protected show(): void {
    const choice = choiceOf(this.dates.getRawValue());
    if (choice.kind !== 'dates') {
      this.problem.set('Give a first and a last day, the first not after the last, at most ten years apart.');
      return;
    }
    this.problem.set(null);
    this.isPicking.set(false);
    this.chosen.emit(choice);
  }
}
