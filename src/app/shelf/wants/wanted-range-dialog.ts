import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { MatSelectModule } from '@angular/material/select';
import type { Quantity } from '@shared/climate/quantity';
import { clearRoomRange, setRoomRange } from '@shared/contracts/room-ranges';
import {
  clearWantedRange,
  setWantedRange,
  type RangeSource,
  type WantedRange,
} from '@shared/contracts/rooms';
import { quantityName, shownUnit } from '@shared/format/quantities';
import { finalize, map, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';
import { quantityTitle } from '../quantity-title';
import { RangePreview } from './range-preview';
import { rangeProblem, savedRange, typedRange } from './wanted-range-form';

/** Which range is changed. */
export interface WantedRangeSubject {
  readonly params: { readonly roomId: string; readonly shelfId: string };
  /** Null to set a first one. */
  readonly range: WantedRange | null;
  /** The quantities to choose from, at least one; only that of the range where there is one. */
  readonly quantities: readonly Quantity[];
}

/** Where a range comes from, and what becomes of that when another one is saved. */
const origins: Readonly<Record<RangeSource, string>> = {
  shelf: 'This one was set for this shelf.',
  plantings: 'This one comes from what grows here; one that you save takes its place.',
  room: 'This one is the room’s: it holds on every shelf with no range of its own or of its plants.',
};

const numberField = (): FormControl<number | null> => new FormControl<number | null>(null);

/** Sets or removes a wanted range. Closes with true once that is saved. */
@Component({
  selector: 'app-wanted-range-dialog',
  templateUrl: './wanted-range-dialog.html',
  styleUrl: './dialog-form.scss',
  imports: [
    MatButton,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    MatRadioModule,
    MatSelectModule,
    ProblemText,
    RangePreview,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WantedRangeDialog {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject<MatDialogRef<WantedRangeDialog, boolean>>(MatDialogRef);
  private readonly unit = inject(Session).temperatureUnit();
  protected readonly subject = inject<WantedRangeSubject>(MAT_DIALOG_DATA);

  protected readonly quantityField = new FormControl<Quantity>(
    this.subject.quantities[0] ?? 'airTemperature',
    {
      nonNullable: true,
    },
  );
  protected readonly quantity = toSignal(this.quantityField.valueChanges, {
    initialValue: this.quantityField.value,
  });
  protected readonly name = computed(() => quantityName[this.quantity()]);
  protected readonly shownUnit = computed(() => shownUnit(this.quantity(), this.unit));
  protected readonly choices = this.subject.quantities.map((quantity) => ({
    quantity,
    title: quantityTitle(quantity),
  }));

  protected readonly sides = [
    { legend: 'With lamps on', low: 'onLow', high: 'onHigh' },
    { legend: 'With lamps off', low: 'offLow', high: 'offHigh' },
  ] as const;
  protected readonly fields = new FormGroup({
    onLow: numberField(),
    onHigh: numberField(),
    offLow: numberField(),
    offHigh: numberField(),
    holdMinutes: numberField(),
    clearingMargin: numberField(),
    urgentBy: numberField(),
    urgentAfterHours: numberField(),
    reason: new FormControl('', { nonNullable: true }),
  });
  /** Whether it is to hold in the whole room rather than on this shelf alone. */
  protected readonly roomField = new FormControl(this.subject.range?.source === 'room', {
    nonNullable: true,
  });
  private readonly typed = toSignal(this.fields.valueChanges.pipe(map(() => this.fields.getRawValue())), {
    initialValue: this.fields.getRawValue(),
  });
  /** The range as it would be saved, for its trial; null while it can't be. */
  protected readonly tried = computed(() => {
    const typed = this.typed();
    return rangeProblem(typed) === null ? savedRange(this.quantity(), typed, this.unit) : null;
  });
  protected readonly origin = this.subject.range === null ? '' : origins[this.subject.range.source];
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  constructor() {
    this.fields.setValue(typedRange(this.quantity(), this.subject.range, this.unit));
    this.quantityField.valueChanges.subscribe((quantity) =>
      this.fields.setValue(typedRange(quantity, null, this.unit)),
    );
  }

  protected save(): void {
    const typed = this.fields.getRawValue();
    const problem = rangeProblem(typed);
    this.problem.set(problem);
    if (problem !== null) return;
    const body = savedRange(this.quantity(), typed, this.unit);
    const { roomId } = this.subject.params;
    this.finish(
      this.roomField.value
        ? this.api.call(setRoomRange, { params: { roomId, quantity: this.quantity() }, body })
        : this.api.call(setWantedRange, { params: this.target(), body }),
    );
  }

  protected remove(): void {
    const { roomId } = this.subject.params;
    this.finish(
      this.subject.range?.source === 'room'
        ? this.api.call(clearRoomRange, { params: { roomId, quantity: this.quantity() } })
        : this.api.call(clearWantedRange, { params: this.target() }),
    );
  }

  private target() {
    return { ...this.subject.params, quantity: this.quantity() };
  }

  private finish(call: Observable<unknown>): void {
    this.isSaving.set(true);
    call.pipe(finalize(() => this.isSaving.set(false))).subscribe({
      next: () => this.dialog.close(true),
      error: (error: unknown) => this.problem.set(failureText(error)),
    });
  }
}
