import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { changePlanting, type PlantingDetail } from '@shared/contracts/plantings';
import { ApiClient } from '../../core/api-client';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';

/** Corrects what is written of a planting. Closes with the planting as it is then. */
@Component({
  selector: 'app-correct-dialog',
  template: `
    <h2 mat-dialog-title>Correct what is written</h2>
    <form [formGroup]="form" (ngSubmit)="save()" novalidate>
      <mat-dialog-content>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Variety</mat-label>
          <input matInput maxlength="80" formControlName="variety" />
          <mat-error>{{ said(form.controls.variety) }}</mat-error>
        </mat-form-field>
        @if (planting.origin === 'sown') {
          <mat-form-field appearance="outline" subscriptSizing="dynamic">
            <mat-label>Depth</mat-label>
            <input matInput type="number" min="0" step="any" inputmode="decimal" formControlName="depthMm" />
            <span matTextSuffix>&nbsp;mm</span>
            <mat-error>{{ said(form.controls.depthMm) ?? 'From 0 to 300 mm.' }}</mat-error>
          </mat-form-field>
        }
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Where from</mat-label>
          <input matInput maxlength="120" formControlName="source" />
          <mat-error>{{ said(form.controls.source) }}</mat-error>
        </mat-form-field>
        <app-problem-text [message]="saving.problem()" />
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Leave it</button>
        <button matButton="filled" type="submit" [disabled]="saving.isSaving()">
          {{ saving.isSaving() ? 'Saving…' : 'Correct it' }}
        </button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: '../note/deed-dialog.scss',
  imports: [MatButton, MatDialogModule, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  providers: [FormSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CorrectDialog {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject<MatDialogRef<CorrectDialog, PlantingDetail>>(MatDialogRef);
  private readonly session = inject(Session);
  protected readonly planting = inject<PlantingDetail>(MAT_DIALOG_DATA);

  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);
  protected readonly form = new FormGroup({
    variety: new FormControl(this.planting.variety ?? '', { nonNullable: true }),
    depthMm: new FormControl<number | null>(this.planting.depthMm, {
      validators: [Validators.min(0), Validators.max(300)],
    }),
    source: new FormControl(this.planting.source, { nonNullable: true }),
  });

  protected save(): void {
    const roomId = this.session.roomId();
    if (roomId === null || this.form.invalid || this.saving.isSaving()) return;
    const { variety, depthMm, source } = this.form.getRawValue();
    const body = { variety: variety.trim() === '' ? null : variety.trim(), depthMm, source: source.trim() };
    this.saving.send(
      this.form,
      this.api.call(changePlanting, { params: { roomId, plantingId: this.planting.id }, body }),
      (planting) => this.dialog.close(planting),
    );
  }
}
