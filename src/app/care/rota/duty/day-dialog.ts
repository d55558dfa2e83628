import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { MatSelectModule } from '@angular/material/select';
import { clearDutyDay, setDutyDay, type DutyDay } from '@shared/contracts/care-rota';
import type { Observable } from 'rxjs';
import { ApiClient } from '../../../core/api-client';
import { serverWords } from '../../../core/field-problems';
import { FormSaving } from '../../../core/form-saving';
import { RoomMembers } from '../../../core/room-members';
import { Session } from '../../../core/session';
import { ProblemText } from '../../../ui/states/problem-text';
import { dayTitle } from '../week/week-words';

/** Whether a day is like its weekday, closed, or with other people. */
type DayKind = 'usual' | 'closed' | 'others';

/** Asks how one day is to be apart from the usual week. */
@Component({
  selector: 'app-day-dialog',
  template: `
    <h2 mat-dialog-title>{{ title }}</h2>
    <form [formGroup]="form" (ngSubmit)="save()" novalidate>
      <mat-dialog-content>
        <mat-radio-group aria-label="Who is there" formControlName="kind">
          <mat-radio-button value="usual">As in the usual week</mat-radio-button>
          <mat-radio-button value="others">Other people on duty</mat-radio-button>
          <mat-radio-button value="closed">Closed, nobody comes</mat-radio-button>
        </mat-radio-group>
        @if (kind() === 'others') {
          <mat-form-field appearance="outline" subscriptSizing="dynamic">
            <mat-label>On duty</mat-label>
            <mat-select multiple formControlName="personIds">
              @for (member of members.caring() ?? []; track member.personId) {
                <mat-option [value]="member.personId">{{ member.name }}</mat-option>
              }
            </mat-select>
            <mat-error>{{ said(form.controls.personIds) }}</mat-error>
          </mat-form-field>
        }
        @if (kind() !== 'usual') {
          <mat-form-field appearance="outline" subscriptSizing="dynamic">
            <mat-label>Note</mat-label>
            <input matInput maxlength="200" formControlName="note" />
            <mat-hint>Such as “holiday”; it stands at the day.</mat-hint>
          </mat-form-field>
        }
        @if (kind() === 'closed') {
          <p>
            Care that is not done on closed days is left out or waits. Everything else stays due and stands as
            short of hands.
          </p>
        }
        <app-problem-text [message]="saving.problem()" />
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Leave it</button>
        <button matButton="filled" type="submit" [disabled]="saving.isSaving()">
          {{ saving.isSaving() ? 'Saving…' : 'Set the day' }}
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
    MatRadioModule,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
  ],
  providers: [FormSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DayDialog {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject<MatDialogRef<DayDialog, true>>(MatDialogRef);
  private readonly session = inject(Session);
  private readonly day = inject<DutyDay>(MAT_DIALOG_DATA);
  protected readonly members = inject(RoomMembers);

  protected readonly title = dayTitle(this.day.day);
  protected readonly form = new FormGroup({
    kind: new FormControl<DayKind>(kindOf(this.day), { nonNullable: true }),
    personIds: new FormControl(
      this.day.onDuty.map(({ personId }) => personId),
      { nonNullable: true },
    ),
    note: new FormControl(this.day.note, { nonNullable: true }),
  });
  protected readonly kind = toSignal(this.form.controls.kind.valueChanges, {
    initialValue: this.form.controls.kind.value,
  });
  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);

  protected save(): void {
    const roomId = this.session.roomId();
    if (this.saving.isSaving() || roomId === null) return;
    this.saving.send(this.form, this.call(roomId), () => this.dialog.close(true));
  }

  private call(roomId: string): Observable<unknown> {
    const params = { roomId, day: this.day.day };
    const { kind, personIds, note } = this.form.getRawValue();
    if (kind === 'usual') return this.api.call(clearDutyDay, { params });
    const isClosed = kind === 'closed';
    return this.api.call(setDutyDay, {
      params,
      body: { isClosed, personIds: isClosed ? null : personIds, note: note.trim() },
    });
  }
}

function kindOf({ isException, isClosed }: DutyDay): DayKind {
  if (!isException) return 'usual';
  return isClosed ? 'closed' : 'others';
}
