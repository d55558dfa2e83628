import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { addShelfEvent, type ShelfEvent } from '@shared/contracts/care';
import type { ShelfEventKind } from '@shared/care/shelf-event';
import { finalize } from 'rxjs';
import { ApiClient, newIdempotencyKey } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { CautionLine } from '../../ui/caution-line/caution-line';
import { ProblemText } from '../../ui/states/problem-text';

/** Where an observation can be noted. */
export interface ObservationPlace {
  readonly roomId: string;
  readonly shelves: readonly { readonly id: string; readonly label: string }[];
}

const kinds: readonly { readonly kind: ShelfEventKind; readonly words: string }[] = [
  { kind: 'observed', words: 'Seen' },
  { kind: 'watered', words: 'Watered' },
  { kind: 'fed', words: 'Fed' },
  { kind: 'trimmed', words: 'Trimmed' },
  { kind: 'picked', words: 'Picked' },
  { kind: 'moved', words: 'Moved' },
  { kind: 'counted', words: 'Counted' },
];

/** Notes what was seen or done on a shelf; what was written stays until it is saved. */
@Component({
  selector: 'app-observation-dialog',
  templateUrl: './observation-dialog.html',
  styleUrl: './observation-dialog.scss',
  imports: [
    CautionLine,
    MatButton,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ObservationDialog {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject<MatDialogRef<ObservationDialog, ShelfEvent>>(MatDialogRef);
  protected readonly place = inject<ObservationPlace>(MAT_DIALOG_DATA);
  // One for the whole dialog: sending again after a lost answer stores nothing twice.
  private readonly idempotencyKey = newIdempotencyKey();

  protected readonly kinds = kinds;
  protected readonly form = new FormGroup({
    shelfId: new FormControl(this.place.shelves[0]?.id ?? '', { nonNullable: true }),
    kind: new FormControl<ShelfEventKind>('observed', { nonNullable: true }),
    text: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/), Validators.maxLength(500)],
    }),
  });
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  protected save(): void {
    if (this.form.invalid || this.isSaving()) return;
    const { shelfId, kind, text } = this.form.getRawValue();
    this.isSaving.set(true);
    this.problem.set(null);
    this.api
      .call(addShelfEvent, {
        params: { roomId: this.place.roomId, shelfId },
        body: { kind, text: text.trim() },
        idempotencyKey: this.idempotencyKey,
      })
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: (event) => this.dialog.close(event),
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }
}
