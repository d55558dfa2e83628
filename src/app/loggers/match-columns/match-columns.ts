import { BreakpointObserver } from '@angular/cdk/layout';
import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
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
import type { SeriesGoal } from './series-goal';

const blockingQuestions: readonly string[] = ['AMBIGUOUS_DAY_MONTH', 'ELAPSED_NEEDS_START'];

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
  protected readonly zones = Intl.supportedValuesOf('timeZone');
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

  private readonly goalCount = computed(
    () =>
      this.file().series.filter(({ sensorId, newSensor }) => sensorId !== null || newSensor !== null).length,
  );
  /** What must be done before the file can be checked; null when nothing. */
  protected readonly missing = computed(() => {
    if (!this.mayMatch()) return 'Growers and keepers of the room may bring files in.';
    if (this.file().questions.some(({ code }) => blockingQuestions.includes(code)))
      return 'Answer the question above first.';
    return this.goalCount() === 0 ? 'Say of at least one column which sensor it is.' : null;
  });

  protected match({ key }: FileSeries, goal: SeriesGoal): void {
    this.data.match({ series: [{ key, ...goal }] });
  }

  protected hold(holds: ColumnHolds): void {
    this.data.match({ columns: [holds] });
  }

  protected answer({ code, column, value }: FileAnswer): void {
    if (code === 'AMBIGUOUS_DAY_MONTH')
      this.data.match({ dateOrder: value === 'monthFirst' ? 'monthFirst' : 'dayFirst' });
    else if (code === 'ELAPSED_NEEDS_START') this.data.match({ startsAt: value });
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
