import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { Crop, CropFigures } from '@shared/contracts/crops';
import { finalize, type Observable } from 'rxjs';
import { failureText } from '../../core/failure-text';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';
import type { FigureSlot } from './figure-slot';
import { figureProblem, savedFigure, shownSlotUnit, typedFigure } from './typed-figure';

/** Which figure is changed, and how the crop is saved. */
export interface FigureSubject {
  readonly cropName: string;
  readonly slot: FigureSlot;
  readonly save: (figures: CropFigures) => Observable<Crop>;
}

const numberField = (): FormControl<number | null> => new FormControl<number | null>(null);

/** Changes one figure of a room's own crop, or takes it away. Closes with true once that is saved. */
@Component({
  selector: 'app-figure-dialog',
  templateUrl: './figure-dialog.html',
  styleUrl: './figure-dialog.scss',
  imports: [MatButton, MatDialogModule, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FigureDialog {
  private readonly dialog = inject<MatDialogRef<FigureDialog, boolean>>(MatDialogRef);
  private readonly reader = inject(Session).temperatureUnit();
  protected readonly subject = inject<FigureSubject>(MAT_DIALOG_DATA);
  protected readonly slot = this.subject.slot;
  protected readonly unit = shownSlotUnit(this.slot, this.reader);

  protected readonly fields = new FormGroup({
    low: numberField(),
    high: numberField(),
    source: new FormControl('', { nonNullable: true }),
  });
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  constructor() {
    this.fields.setValue(typedFigure(this.slot, this.reader));
  }

  protected save(): void {
    const typed = this.fields.getRawValue();
    const problem = figureProblem(this.slot, typed, this.reader);
    this.problem.set(problem);
    if (problem === null) this.finish(this.slot.with(savedFigure(this.slot, typed, this.reader)));
  }

  protected takeAway(): void {
    this.finish(this.slot.with(null));
  }

  private finish(figures: CropFigures): void {
    this.isSaving.set(true);
    this.subject
      .save(figures)
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: () => this.dialog.close(true),
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }
}
