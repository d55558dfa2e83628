import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { Room } from '@shared/contracts/rooms';
import { type Observable } from 'rxjs';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { ProblemText } from '../../ui/states/problem-text';

/** Where the room is, and how another place is kept. */
export interface PlaceSubject {
  readonly room: Room;
  readonly save: (place: { latitudeDeg: number; longitudeDeg: number | null }) => Observable<Room>;
}

/** Says where the room is. Closes with true once that is saved. */
@Component({
  selector: 'app-place-dialog',
  template: `
    <h2 mat-dialog-title>Where the room is</h2>
    <form [formGroup]="form" (submit)="$event.preventDefault(); save()" novalidate>
      <mat-dialog-content>
        <p>
          The length of the day follows from the latitude, and with it which onions form bulbs here. A tenth
          of a degree is near enough; any map shows it.
        </p>
        <mat-form-field appearance="outline" subscriptSizing="dynamic" hideRequiredMarker>
          <mat-label>Latitude</mat-label>
          <input matInput type="number" step="any" inputmode="decimal" formControlName="latitudeDeg" />
          <span matTextSuffix>&nbsp;°</span>
          <mat-hint>North of the equator is above zero, south is below.</mat-hint>
          <mat-error>{{ said(form.controls.latitudeDeg) ?? 'From -90 to 90.' }}</mat-error>
        </mat-form-field>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Longitude</mat-label>
          <input matInput type="number" step="any" inputmode="decimal" formControlName="longitudeDeg" />
          <span matTextSuffix>&nbsp;°</span>
          <mat-hint>East is above zero, west is below. It may be left out.</mat-hint>
          <mat-error>{{ said(form.controls.longitudeDeg) ?? 'From -180 to 180.' }}</mat-error>
        </mat-form-field>
        <app-problem-text [message]="saving.problem()" />
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" [mat-dialog-close]="false">Leave it</button>
        <button matButton="filled" type="submit" [disabled]="saving.isSaving()">Save the place</button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: '../sowing-dialog.scss',
  imports: [MatButton, MatDialogModule, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  providers: [FormSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlaceDialog {
  private readonly dialog = inject<MatDialogRef<PlaceDialog, boolean>>(MatDialogRef);
  private readonly subject = inject<PlaceSubject>(MAT_DIALOG_DATA);

  protected readonly form = new FormGroup({
    latitudeDeg: new FormControl<number | null>(this.subject.room.latitudeDeg, {
      validators: [Validators.required, Validators.min(-90), Validators.max(90)],
    }),
    longitudeDeg: new FormControl<number | null>(this.subject.room.longitudeDeg, {
      validators: [Validators.min(-180), Validators.max(180)],
    }),
  });
  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);

  protected save(): void {
    this.form.markAllAsTouched();
    const { latitudeDeg, longitudeDeg } = this.form.getRawValue();
    if (this.form.invalid || latitudeDeg === null || this.saving.isSaving()) return;
    this.saving.send(this.form, this.subject.save({ latitudeDeg, longitudeDeg }), () =>
      this.dialog.close(true),
    );
  }
}
