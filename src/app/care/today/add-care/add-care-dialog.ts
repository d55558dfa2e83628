import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { careKinds, type CareKind } from '@shared/care/care-kind';
import type { CareDays } from '@shared/contracts/care';
import type { CarePlace } from '@shared/contracts/care-place';
import type { Completion, NewTask } from '../../../core/care/care-deed';
import { Session } from '../../../core/session';
import { careKindLooks } from '../../../ui/care-kind/care-kind-look';

/** An unplanned task, done at once or not. */
export interface AddedCare {
  readonly task: NewTask;
  readonly completion: Completion | null;
}

/** Places that the phone knows, signal or not: the room, its plantings, and shelves that care is about. */
interface PlaceChoice {
  readonly place: CarePlace;
  readonly words: string;
}

/** Asks for care that no routine planned. */
@Component({
  selector: 'app-add-care-dialog',
  templateUrl: './add-care-dialog.html',
  styleUrl: '../care-dialog.scss',
  imports: [
    MatButton,
    MatCheckbox,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AddCareDialog {
  private readonly dialog = inject<MatDialogRef<AddCareDialog, AddedCare>>(MatDialogRef);
  private readonly session = inject(Session);
  private readonly days = inject<CareDays>(MAT_DIALOG_DATA);

  protected readonly kinds = careKinds.map((kind) => ({ kind, word: careKindLooks[kind].word }));
  protected readonly places = placesOf(this.days);
  protected readonly form = new FormGroup({
    kind: new FormControl<CareKind>('water', { nonNullable: true }),
    title: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/), Validators.maxLength(120)],
    }),
    place: new FormControl(this.places[0], { nonNullable: true }),
    isDone: new FormControl(false, { nonNullable: true }),
    isMine: new FormControl(true, { nonNullable: true }),
  });

  protected add(): void {
    if (this.form.invalid) {
      this.form.markAllAsTouched();
      return;
    }
    const { kind, title, place, isDone, isMine } = this.form.getRawValue();
    const personId = this.session.account()?.id;
    this.dialog.close({
      task: {
        kind,
        title: title.trim(),
        place: place?.place ?? { at: 'room' },
        personIds: (isMine || isDone) && personId !== undefined ? [personId] : [],
      },
      completion: isDone ? { outcome: 'done' } : null,
    });
  }
}

function placesOf({ tasks, plantings }: CareDays): readonly PlaceChoice[] {
  const shelves = new Map(
    tasks.flatMap(({ shelfId, shelfLabel }) =>
      shelfId === null || shelfLabel === null ? [] : [[shelfId, shelfLabel] as const],
    ),
  );
  return [
    { place: { at: 'room' }, words: 'The whole room' },
    ...[...shelves]
      .toSorted(([, one], [, other]) => one.localeCompare(other))
      .map(([shelfId, label]) => ({ place: { at: 'shelf', shelfId } as const, words: `Shelf ${label}` })),
    ...plantings.map(({ id, label }) => ({
      place: { at: 'planting', plantingId: id } as const,
      words: label,
    })),
  ];
}
