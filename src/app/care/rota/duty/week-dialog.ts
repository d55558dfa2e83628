import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { weekdayNames } from '@shared/care/timing-words';
import { setDutyWeek, type DutyWeekday } from '@shared/contracts/care-rota';
import { finalize } from 'rxjs';
import { ApiClient } from '../../../core/api-client';
import { failureText } from '../../../core/failure-text';
import { RoomMembers } from '../../../core/room-members';
import { Session } from '../../../core/session';
import { ProblemText } from '../../../ui/states/problem-text';

/** Asks who is on duty on each weekday, and on which nobody comes. */
@Component({
  selector: 'app-week-dialog',
  template: `
    <h2 mat-dialog-title>The usual week</h2>
    <form (ngSubmit)="save()" novalidate>
      <mat-dialog-content>
        <p>
          Care for whoever is on duty goes to these people. On a closed day nobody comes; a single day can be
          set apart from the week by its heading.
        </p>
        @for (day of days; track day.weekday) {
          <div class="weekday" [formGroup]="day.form">
            <mat-form-field appearance="outline" subscriptSizing="dynamic">
              <mat-label>{{ day.name }}</mat-label>
              <mat-select multiple formControlName="personIds">
                @for (member of members.caring() ?? []; track member.personId) {
                  <mat-option [value]="member.personId">{{ member.name }}</mat-option>
                }
              </mat-select>
            </mat-form-field>
            <mat-checkbox formControlName="isClosed" [aria-label]="day.name + ' closed'">Closed</mat-checkbox>
          </div>
        }
        <app-problem-text [message]="problem()" />
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Leave it</button>
        <button matButton="filled" type="submit" [disabled]="isSaving()">
          {{ isSaving() ? 'Saving…' : 'Set the week' }}
        </button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: './duty-dialog.scss',
  imports: [
    MatButton,
    MatCheckbox,
    MatDialogModule,
    MatFormFieldModule,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WeekDialog {
  readonly week = inject<readonly DutyWeekday[]>(MAT_DIALOG_DATA);

  private readonly api = inject(ApiClient);
  private readonly dialog = inject<MatDialogRef<WeekDialog, true>>(MatDialogRef);
  private readonly session = inject(Session);
  protected readonly members = inject(RoomMembers);

  protected readonly days = this.week.map(({ weekday, isClosed, onDuty }) => ({
    weekday,
    name: weekdayNames[weekday - 1] ?? '',
    form: new FormGroup({
      personIds: new FormControl(
        onDuty.map(({ personId }) => personId),
        { nonNullable: true },
      ),
      isClosed: new FormControl(isClosed, { nonNullable: true }),
    }),
  }));
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  protected save(): void {
    const roomId = this.session.roomId();
    if (this.isSaving() || roomId === null) return;
    this.isSaving.set(true);
    this.problem.set(null);
    const week = this.days.map(({ weekday, form }) => ({ weekday, ...form.getRawValue() }));
    this.api
      .call(setDutyWeek, { params: { roomId }, body: { week } })
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: () => this.dialog.close(true),
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }
}
