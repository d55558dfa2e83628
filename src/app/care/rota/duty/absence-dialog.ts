import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { addAbsence, type Absence } from '@shared/contracts/care-rota';
import { ApiClient, newIdempotencyKey } from '../../../core/api-client';
import { serverWords } from '../../../core/field-problems';
import { FormSaving } from '../../../core/form-saving';
import { RoomMembers } from '../../../core/room-members';
import { Session } from '../../../core/session';
import { ProblemText } from '../../../ui/states/problem-text';

/** Asks from when to when somebody is away: oneself, or as a keeper anybody. */
@Component({
  selector: 'app-absence-dialog',
  template: `
    <h2 mat-dialog-title>{{ mayPlan() ? 'Who is away?' : 'When are you away?' }}</h2>
    <form [formGroup]="form" (ngSubmit)="save()" novalidate>
      <mat-dialog-content>
        <p>Open tasks of those days go to others where they may; what is left stands as short of hands.</p>
        @if (mayPlan()) {
          <mat-form-field appearance="outline" subscriptSizing="dynamic">
            <mat-label>Person</mat-label>
            <mat-select formControlName="personId">
              @for (member of members.caring() ?? []; track member.personId) {
                <mat-option [value]="member.personId">{{ member.name }}</mat-option>
              }
            </mat-select>
            <mat-error>{{ said(form.controls.personId) }}</mat-error>
          </mat-form-field>
        }
        <mat-form-field appearance="outline" subscriptSizing="dynamic" hideRequiredMarker>
          <mat-label>First day</mat-label>
          <input matInput type="date" formControlName="from" />
          <mat-error>{{ said(form.controls.from) ?? 'Choose the first day.' }}</mat-error>
        </mat-form-field>
        <mat-form-field appearance="outline" subscriptSizing="dynamic" hideRequiredMarker>
          <mat-label>Last day</mat-label>
          <input matInput type="date" formControlName="to" [min]="form.controls.from.value" />
          <mat-error>{{ said(form.controls.to) ?? 'Choose the last day.' }}</mat-error>
        </mat-form-field>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Note</mat-label>
          <input matInput maxlength="200" formControlName="note" />
          <mat-hint>Everybody in the room can read it.</mat-hint>
        </mat-form-field>
        <app-problem-text [message]="saving.problem()" />
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Leave it</button>
        <button matButton="filled" type="submit" [disabled]="saving.isSaving()">
          {{ saving.isSaving() ? 'Saving…' : 'Note it' }}
        </button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: './duty-dialog.scss',
  imports: [
    MatButton,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
  ],
  providers: [FormSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AbsenceDialog {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject<MatDialogRef<AbsenceDialog, Absence>>(MatDialogRef);
  private readonly session = inject(Session);
  private readonly today = inject<string>(MAT_DIALOG_DATA);
  protected readonly members = inject(RoomMembers);
  // One for the whole dialog: sending again after a lost answer notes nothing twice.
  private readonly idempotencyKey = newIdempotencyKey();

  protected readonly form = new FormGroup({
    personId: new FormControl(this.session.account()?.id ?? '', { nonNullable: true }),
    from: new FormControl(this.today, { nonNullable: true, validators: [Validators.required] }),
    to: new FormControl(this.today, { nonNullable: true, validators: [Validators.required] }),
    note: new FormControl('', { nonNullable: true }),
  });
  protected readonly said = serverWords;
  protected readonly mayPlan = computed(() => this.session.may('keeper'));
  protected readonly saving = inject(FormSaving);

  protected save(): void {
    const roomId = this.session.roomId();
    if (this.saving.isSaving() || roomId === null) return;
    if (this.form.invalid) {
      this.form.markAllAsTouched();
      return;
    }
    const call = this.api.call(addAbsence, {
      params: { roomId },
      body: this.form.getRawValue(),
      idempotencyKey: this.idempotencyKey,
    });
    this.saving.send(this.form, call, (absence) => this.dialog.close(absence));
  }
}
