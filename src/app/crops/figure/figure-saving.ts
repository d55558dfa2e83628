import { inject, Injectable, signal } from '@angular/core';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import type { Crop, CropFigures } from '@shared/contracts/crops';
import { finalize, type Observable } from 'rxjs';
import { failureText } from '../../core/failure-text';
import type { CropSlot } from './crop-slot';

/** Which figure is changed, and how the crop is saved. */
export interface FigureSubject<Slot extends CropSlot = CropSlot> {
  readonly cropName: string;
  readonly slot: Slot;
  readonly save: (figures: CropFigures) => Observable<Crop>;
}

/** Saves a crop with a changed figure and closes the dialog with true. One for each dialog. */
@Injectable()
export class FigureSaving {
  private readonly dialog = inject<MatDialogRef<unknown, boolean>>(MatDialogRef);
  private readonly subject = inject<FigureSubject>(MAT_DIALOG_DATA);

  readonly isSaving = signal(false);
  /** Why it was not saved; null while nothing is wrong. */
  readonly problem = signal<string | null>(null);

  /** Saves the crop with these figures. */
  finish(figures: CropFigures): void {
    this.problem.set(null);
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
