import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { SowingCalendar } from '@shared/contracts/sowing';
import { type Observable } from 'rxjs';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { RoomCrops } from '../../core/room-crops';
import { CropPicker } from '../../ui/crop-picker/crop-picker';
import { LoadingLines } from '../../ui/states/loading-lines';
import { ProblemText } from '../../ui/states/problem-text';

/** What is changed: a crop that stands on the calendar, or none yet. */
export interface ChoiceSubject {
  /** Null to put a further crop on the calendar. */
  readonly plan: {
    readonly cropId: string;
    readonly cropName: string;
    readonly everyDays: number | null;
  } | null;
  /** Crops that stand there already. */
  readonly chosenIds: readonly string[];
  readonly save: (cropId: string, everyDays: number | null) => Observable<SowingCalendar>;
}

const usualEveryDays = 14;

/** Puts a crop on the sowing calendar, with one sowing or several that follow each other. Closes with true. */
@Component({
  selector: 'app-crop-choice-dialog',
  templateUrl: './crop-choice-dialog.html',
  styleUrl: '../sowing-dialog.scss',
  imports: [
    CropPicker,
    LoadingLines,
    MatButton,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    ProblemText,
    ReactiveFormsModule,
  ],
  providers: [FormSaving, RoomCrops],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CropChoiceDialog {
  private readonly dialog = inject<MatDialogRef<CropChoiceDialog, boolean>>(MatDialogRef);
  protected readonly subject = inject<ChoiceSubject>(MAT_DIALOG_DATA);
  protected readonly crops = inject(RoomCrops);

  protected readonly form = new FormGroup({
    cropId: new FormControl<string | null>(this.subject.plan?.cropId ?? null, {
      validators: [Validators.required],
    }),
    everyDays: new FormControl<number | null>(this.subject.plan?.everyDays ?? usualEveryDays, {
      validators: [Validators.min(1), Validators.max(366), Validators.pattern(/^\d+$/)],
    }),
  });
  /** Whether sowings follow each other. */
  protected readonly isStaggered = signal(this.subject.plan !== null && this.subject.plan.everyDays !== null);
  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);

  /** Crops that are sown and don't stand on the calendar yet; those with published sowing times first. */
  protected readonly offered = computed(() => {
    const chosen = new Set(this.subject.chosenIds);
    const sown = (this.crops.all() ?? []).filter(({ id, hasSeed }) => hasSeed && !chosen.has(id));
    return sown.toSorted((one, other) => Number(other.hasSowingTimes) - Number(one.hasSowingTimes));
  });
  private readonly cropId = toSignal(this.form.controls.cropId.valueChanges, {
    initialValue: this.form.controls.cropId.value,
  });
  protected readonly lacksTimes = computed(
    () => this.crops.all()?.find(({ id }) => id === this.cropId())?.hasSowingTimes === false,
  );

  protected save(): void {
    this.form.markAllAsTouched();
    const { cropId, everyDays } = this.form.getRawValue();
    const isWrong = this.isStaggered() && (everyDays === null || this.form.controls.everyDays.invalid);
    if (cropId === null || isWrong || this.saving.isSaving()) return;
    this.saving.send(this.form, this.subject.save(cropId, this.isStaggered() ? everyDays : null), () =>
      this.dialog.close(true),
    );
  }
}
