import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormArray, FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { sayAt, serverWords } from '../../core/field-problems';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';
import { FigureActions } from './figure-actions';
import { FigureSaving, type FigureSubject } from './figure-saving';
import { savedSource } from './saved-source';
import { SourceField } from './source-field';
import type { TableSlot } from './table-slot';
import { mostRows, savedRows, shownRows, tableProblem, type TypedRow } from './typed-table';

const emptyRow: TypedRow = { temperature: null, value: null };

/** Changes a table of a room's own crop, or takes it away. Closes with true once that is saved. */
@Component({
  selector: 'app-table-dialog',
  templateUrl: './table-dialog.html',
  styleUrls: ['./figure-dialog.scss', './table-dialog.scss'],
  imports: [
    FigureActions,
    MatButton,
    MatDialogModule,
    MatFormFieldModule,
    MatIcon,
    MatIconButton,
    MatInput,
    ProblemText,
    ReactiveFormsModule,
    SourceField,
  ],
  providers: [FigureSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TableDialog {
  protected readonly unit = inject(Session).temperatureUnit();
  protected readonly saving = inject(FigureSaving);
  protected readonly subject = inject<FigureSubject<TableSlot>>(MAT_DIALOG_DATA);
  protected readonly slot = this.subject.slot;
  protected readonly said = serverWords;
  protected readonly mostRows = mostRows;

  protected readonly rows = new FormArray(shownRows(this.slot, this.unit).map(rowControls));
  protected readonly source = new FormControl(this.slot.figure?.source ?? '', { nonNullable: true });
  /** Rows as they are drawn. */
  protected readonly lines = signal([...this.rows.controls]);

  protected add(): void {
    this.rows.push(rowControls(emptyRow));
    this.lines.set([...this.rows.controls]);
  }

  protected remove(index: number): void {
    this.rows.removeAt(index);
    this.lines.set([...this.rows.controls]);
  }

  protected save(): void {
    const rows = this.rows.getRawValue();
    const problem = tableProblem(this.slot, rows, this.unit);
    this.saving.problem.set(problem?.index === null ? problem.words : null);
    if (problem !== null) {
      if (problem.index !== null) sayAt(this.rows.at(problem.index).controls[problem.name], problem.words);
      return;
    }
    const figure = { rows: savedRows(this.slot, rows, this.unit), source: savedSource(this.source.value) };
    this.saving.finish(this.slot.with(figure));
  }

  protected takeAway(): void {
    this.saving.finish(this.slot.with(null));
  }
}

function rowControls({ temperature, value }: TypedRow) {
  return new FormGroup({
    temperature: new FormControl<number | null>(temperature),
    value: new FormControl<number | null>(value),
  });
}
