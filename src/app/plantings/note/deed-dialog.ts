import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { listPlantings, type PlantingDetail } from '@shared/contracts/plantings';
import { lossReasons, settableStages } from '@shared/growing/planting-event';
import { ApiClient, newIdempotencyKey } from '../../core/api-client';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { RoomClock } from '../../core/room-clock';
import { fieldTime } from '../../core/room-instant';
import { RoomShelves } from '../../core/room-shelves';
import { Session } from '../../core/session';
import { CautionLine } from '../../ui/caution-line/caution-line';
import type { Hazard } from '../../ui/caution-line/cautions';
import { ProblemText } from '../../ui/states/problem-text';
import { WhenField } from '../../ui/when-field/when-field';
import type { PlantingData } from '../planting/planting-data';
import { lossWords } from '../words/event-words';
import { countWords, placeWords, plantingTitle, stageNames } from '../words/planting-facts';
import { deedLooks, type DeedKind } from './deed';
import { deedForm, deedOf } from './deed-fields';

/** What is to be written down, and of which planting. */
export interface DeedSubject {
  readonly kind: DeedKind;
  readonly planting: PlantingDetail;
  readonly data: PlantingData;
}

const hazards: Readonly<Partial<Record<DeedKind, Hazard>>> = {
  harvested: 'eating',
  moved: 'lifting',
};
const containers = ['Cell flat', '7 cm pot', '9 cm pot', '13 cm pot', '4 L pot', '10 L pot'];

/** Asks what a deed needs to be written down; what was typed stays until it is kept. */
@Component({
  selector: 'app-deed-dialog',
  templateUrl: './deed-dialog.html',
  styleUrl: './deed-dialog.scss',
  imports: [
    CautionLine,
    MatAutocompleteModule,
    MatButton,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
    WhenField,
  ],
  providers: [FormSaving, RoomShelves],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DeedDialog {
  private readonly api = inject(ApiClient);
  private readonly clock = inject(RoomClock);
  private readonly dialog = inject<MatDialogRef<DeedDialog>>(MatDialogRef);
  private readonly session = inject(Session);
  private readonly subject = inject<DeedSubject>(MAT_DIALOG_DATA);
  protected readonly places = inject(RoomShelves);
  // One for the whole dialog: sending again after a lost answer stores nothing twice.
  private readonly idempotencyKey = newIdempotencyKey();

  protected readonly kind = this.subject.kind;
  protected readonly planting = this.subject.planting;
  protected readonly look = deedLooks[this.kind];
  protected readonly hazard = hazards[this.kind] ?? null;
  protected readonly form = deedForm(this.kind, this.planting);
  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);
  protected readonly containers = containers;
  protected readonly stages = settableStages.map((stage) => ({ stage, word: stageNames[stage] }));
  protected readonly reasons = lossReasons.map((reason) => ({ reason, word: lossWords[reason] }));

  private readonly otherResource = rxResource({
    params: () => {
      const [roomId, { cropId }] = [this.session.roomId(), this.planting];
      return roomId === null || cropId === null || this.kind !== 'merged' ? undefined : { roomId, cropId };
    },
    stream: ({ params: { roomId, cropId } }) =>
      this.api.call(listPlantings, { params: { roomId }, query: { cropId, limit: 200 } }),
  });
  /** Plantings of the same crop that are up; null until known. */
  protected readonly others = computed(() =>
    this.otherResource.hasValue()
      ? this.otherResource
          .value()
          .plantings.filter(({ id, stage }) => id !== this.planting.id && stage !== 'sown')
          .map((other) => ({
            id: other.id,
            words: `${plantingTitle(other)} · ${countWords(other)} · ${placeWords(other)}`,
          }))
      : null,
  );
  protected readonly earliest = fieldTime(this.planting.startedAt, this.session.timeZone());
  protected readonly now = computed(() => fieldTime(this.clock.calmNow(), this.session.timeZone()));
  protected readonly countLabel = this.kind === 'harvested' ? 'Pieces' : 'How many plants';
  protected readonly countProblem =
    this.kind === 'harvested'
      ? 'A whole number, 1 or more.'
      : `A whole number from 1 to ${this.planting.count}.`;

  protected asks(field: (typeof this.look.fields)[number]): boolean {
    return this.look.fields.includes(field);
  }

  protected save(): void {
    if (this.saving.isSaving()) return;
    if (this.form.invalid) {
      this.form.markAllAsTouched();
      this.saving.problem.set(
        this.form.hasError('nothing') ? 'Give a weight, a number of pieces, or both.' : null,
      );
      return;
    }
    this.saving.send(
      this.form,
      this.subject.data.take(
        deedOf(this.kind, this.form, this.session.timeZone()),
        `${plantingTitle(this.planting)}: ${this.look.word.toLowerCase()}, written down`,
        this.idempotencyKey,
      ),
      () => this.dialog.close(),
    );
  }
}
