import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { listMembers, roleSuffices } from '@shared/contracts/people';
import { map } from 'rxjs';
import { ApiClient } from '../../../core/api-client';
import { Session } from '../../../core/session';

/** To whom a task is offered, and what is said with it. */
export interface Offer {
  /** Null for all who help. */
  readonly toPersonId: string | null;
  readonly note: string;
}

/** Asks to whom a task shall be offered. */
@Component({
  selector: 'app-offer-dialog',
  template: `
    <h2 mat-dialog-title>Offer “{{ title }}” to others</h2>
    <form [formGroup]="form" (ngSubmit)="offer()">
      <mat-dialog-content>
        <p>They are told by mail. It stays yours until somebody takes it.</p>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>To whom</mat-label>
          <mat-select formControlName="toPersonId">
            <mat-option value="">Everybody who helps</mat-option>
            @for (member of others(); track member.personId) {
              <mat-option [value]="member.personId">{{ member.name }}</mat-option>
            }
          </mat-select>
        </mat-form-field>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Note</mat-label>
          <input matInput formControlName="note" />
          <mat-hint>Optional: why, or what to know.</mat-hint>
          <mat-error>At most 200 characters.</mat-error>
        </mat-form-field>
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Leave it</button>
        <button matButton="filled" type="submit">Offer it</button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: '../care-dialog.scss',
  imports: [MatButton, MatDialogModule, MatFormFieldModule, MatInput, MatSelectModule, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OfferDialog {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly dialog = inject<MatDialogRef<OfferDialog, Offer>>(MatDialogRef);
  protected readonly title = inject<string>(MAT_DIALOG_DATA);
  protected readonly form = new FormGroup({
    toPersonId: new FormControl('', { nonNullable: true }),
    note: new FormControl('', { nonNullable: true, validators: Validators.maxLength(200) }),
  });
  private readonly members = rxResource({
    stream: () =>
      this.api
        .call(listMembers, { params: { roomId: this.session.roomId() ?? '' } })
        .pipe(
          map((members) =>
            members.filter(
              ({ personId, role }) => personId !== this.session.account()?.id && roleSuffices(role, 'helper'),
            ),
          ),
        ),
  });
  /** Those who could take it; until they are known it can still be offered to everybody. */
  protected readonly others = computed(() => (this.members.hasValue() ? this.members.value() : []));

  protected offer(): void {
    if (this.form.invalid) return;
    const { toPersonId, note } = this.form.getRawValue();
    this.dialog.close({ toPersonId: toPersonId === '' ? null : toPersonId, note: note.trim() });
  }
}
