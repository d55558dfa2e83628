import { BreakpointObserver } from '@angular/cdk/layout';
import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { FileSeries, LoggerFileDetail } from '@shared/contracts/logger-files';
import { map } from 'rxjs';
import { Session } from '../../core/session';
import { shapeWords } from '../file-words';
import { LoggerFileData } from '../logger-file-data';
import { ColumnMeaning, type ColumnHolds } from './column-meaning';
import { FileProfiles } from './file-profiles';
import { FileQuestions, type FileAnswer } from './file-questions';
import { previewLines } from './preview-cells';
import { SeriesChoice } from './series-choice';
import { proposedGoals, type SeriesGoal } from './series-goal';

/** The second step: which series is which sensor, with lines of the file as they would be stored. */
@Component({
  selector: 'app-match-columns',
  templateUrl: './match-columns.html',
  styleUrl: './match-columns.scss',
  imports: [
    ColumnMeaning,
    FileProfiles,
    FileQuestions,
    MatButton,
    MatFormFieldModule,
    MatInput,
    SeriesChoice,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MatchColumns {
  readonly file = input.required<LoggerFileDetail>();
  readonly mayMatch = input.required<boolean>();
  readonly checkChosen = output();

  protected readonly data = inject(LoggerFileData);

  private readonly isNarrow = toSignal(
    inject(BreakpointObserver)
      .observe('(width < 800px)')
      .pipe(map(({ matches }) => matches)),
    { initialValue: false },
  );
  /** UTC, which files often say, is in no browser's list. */
  protected readonly zones = computed(() => [
    ...new Set([this.file().zone, 'UTC', ...Intl.supportedValuesOf('timeZone')]),
  ]);
  protected readonly roomZone = inject(Session).timeZone;
  protected readonly shape = computed(() => shapeWords(this.file()));
  protected readonly lines = computed(() => previewLines(this.file()));
  protected readonly columns = computed(() =>
    this.file().columns.map((column) => ({
      column,
      name: column.name || `column ${column.index + 1}`,
      series: this.file().series.filter((series) => series.column === column.index),
    })),
  );
  /** On a narrow screen, or where a column holds several sensors' rows, choices stand above the table. */
  protected readonly isListed = computed(
    () => this.isNarrow() || this.columns().some(({ series }) => series.length > 1),
  );

  /** Whether rows name their quantity themselves, so that one column holds several series. */
  protected readonly isLong = computed(() => this.file().columns.some(({ role }) => role === 'value'));
  protected readonly proposals = computed(() => proposedGoals(this.file().series));
  protected readonly proposalWords = computed(() => {
    const count = this.proposals().length;
    return count === 1 ? 'A sensor is proposed for one series.' : `Sensors are proposed for ${count} series.`;
  });

  /** Whether the person has said how the dates are written, where that is in doubt. */
  private readonly isDateOrderSaid = signal(false);
  private readonly mustAnswer = computed(() =>
    this.file().questions.some(({ code, answer }) => {
      if (code === 'ELAPSED_NEEDS_START') return answer === null;
      // Whoever kept the profile has answered it.
      return code === 'AMBIGUOUS_DAY_MONTH' && !this.isDateOrderSaid() && this.file().profileId === null;
    }),
  );
  private readonly goalCount = computed(
    () =>
      this.file().series.filter(({ sensorId, newSensor }) => sensorId !== null || newSensor !== null).length,
  );
  /** What must be done before the file can be checked; null when nothing. */
  protected readonly missing = computed(() => {
    if (!this.mayMatch()) return 'Growers and keepers of the room may bring files in.';
    if (this.mustAnswer()) return 'Answer the question above first.';
    return this.goalCount() === 0 ? 'Say of at least one column which sensor it is.' : null;
  });

  protected match({ key }: FileSeries, goal: SeriesGoal): void {
    this.data.match({ series: [{ key, ...goal }] });
  }

  protected takeProposals(): void {
    this.data.match({ series: [...this.proposals()] });
  }

  /** @param series - One of a file whose rows name their quantity; the name stands for the unit from now on. */
  protected nameUnit({ name, quantity }: FileSeries, unit: string): void {
    this.data.match({ names: [{ name, quantity, unit }] });
  }

  protected hold(holds: ColumnHolds): void {
    this.data.match({ columns: [holds] });
  }

  protected answer({ code, column, value }: FileAnswer): void {
    if (code === 'AMBIGUOUS_DAY_MONTH') {
      this.isDateOrderSaid.set(true);
      this.data.match({ dateOrder: value === 'monthFirst' ? 'monthFirst' : 'dayFirst' });
    } else if (code === 'ELAPSED_NEEDS_START') this.data.match({ startsAt: value });
    else this.changeUnit(column, value);
  }

  protected chooseZone(zone: string): void {
    this.data.match({ zone });
  }

  private changeUnit(index: number | null, unit: string): void {
    const column = this.file().columns.find((one) => one.index === index);
    if (column !== undefined) this.hold({ index: column.index, quantity: column.quantity, unit });
  }
}
