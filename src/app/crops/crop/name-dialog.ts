import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { type Observable } from 'rxjs';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { ProblemText } from '../../ui/states/problem-text';

/** What gets a name, and how it is kept under it. */
export interface NameSubject<Kept> {
  readonly title: string;
  readonly text: string;
  readonly name: string;
  /** "Copy the crop" */
  readonly deed: string;
  readonly save: (name: string) => Observable<Kept>;
}

/** Asks for a name. Closes with what was kept under it. */
@Component({
  selector: 'app-name-dialog',
  template: `
    <h2 mat-dialog-title>{{ subject.title }}</h2>
    <form [formGroup]="form" (submit)="$event.preventDefault(); save()" novalidate>
      <mat-dialog-content>
        <p>{{ subject.text }}</p>
        <mat-form-field appearance="outline" subscriptSizing="dynamic" hideRequiredMarker>
          <mat-label>Name</mat-label>
          <input matInput maxlength="80" formControlName="name" />
          <mat-error>{{ said(form.controls.name) ?? 'It needs a name.' }}</mat-error>
        </mat-form-field>
        <app-problem-text [message]="saving.problem()" />
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton type="button" mat-dialog-close>Leave it</button>
        <button matButton="filled" type="submit" [disabled]="saving.isSaving()">{{ subject.deed }}</button>
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: '../figure/figure-dialog.scss',
  imports: [MatButton, MatDialogModule, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  providers: [FormSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NameDialog {
  private readonly dialog = inject<MatDialogRef<NameDialog>>(MatDialogRef);
  protected readonly subject = inject<NameSubject<unknown>>(MAT_DIALOG_DATA);

  protected readonly form = new FormGroup({
    name: new FormControl(this.subject.name, {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/\S/)],
    }),
  });
  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);

  protected save(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.saving.isSaving()) return;
    this.saving.send(this.form, this.subject.save(this.form.controls.name.value.trim()), (kept) =>
      this.dialog.close(kept),
    );
  }
}
