import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';
import { FigureActions } from './figure-actions';
import { FigureSaving, type FigureSubject } from './figure-saving';
import type { FigureSlot } from './figure-slot';
import { SourceField } from './source-field';
import { shownUnit } from './typed-fields';
import { figureProblem, savedFigure, typedFigure } from './typed-figure';

const numberField = (): FormControl<number | null> => new FormControl<number | null>(null);

/** Changes one figure of a room's own crop, or takes it away. Closes with true once that is saved. */
@Component({
  selector: 'app-figure-dialog',
  templateUrl: './figure-dialog.html',
  styleUrl: './figure-dialog.scss',
  imports: [
    FigureActions,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    ProblemText,
    ReactiveFormsModule,
    SourceField,
  ],
  providers: [FigureSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FigureDialog {
  protected readonly saving = inject(FigureSaving);
  private readonly reader = inject(Session).temperatureUnit();
  protected readonly subject = inject<FigureSubject<FigureSlot>>(MAT_DIALOG_DATA);
  protected readonly slot = this.subject.slot;
  protected readonly unit = shownUnit(this.slot.unit, this.reader);

  protected readonly fields = new FormGroup({
    low: numberField(),
    high: numberField(),
    source: new FormControl('', { nonNullable: true }),
  });

  constructor() {
    this.fields.setValue(typedFigure(this.slot, this.reader));
  }

  protected save(): void {
    const typed = this.fields.getRawValue();
    const problem = figureProblem(this.slot, typed, this.reader);
    this.saving.problem.set(problem);
    if (problem === null) this.saving.finish(this.slot.with(savedFigure(this.slot, typed, this.reader)));
  }

  protected takeAway(): void {
    this.saving.finish(this.slot.with(null));
  }
}
