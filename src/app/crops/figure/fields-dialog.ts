import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { FormControl, FormRecord, ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { sayAt, serverWords } from '../../core/field-problems';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';
import type { FieldsSlot } from './fields-slot';
import { FigureActions } from './figure-actions';
import { FigureSaving, type FigureSubject } from './figure-saving';
import { savedSource } from './saved-source';
import { SourceField } from './source-field';
import { fieldsProblem, isWanted, shownFields, shownUnit, storedFields } from './typed-fields';

/** Changes a figure of several fields of a room's own crop, or takes it away. Closes with true once that is saved. */
@Component({
  selector: 'app-fields-dialog',
  templateUrl: './fields-dialog.html',
  styleUrl: './figure-dialog.scss',
  imports: [
    FigureActions,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
    SourceField,
  ],
  providers: [FigureSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FieldsDialog {
  private readonly reader = inject(Session).temperatureUnit();
  protected readonly saving = inject(FigureSaving);
  protected readonly subject = inject<FigureSubject<FieldsSlot>>(MAT_DIALOG_DATA);
  protected readonly slot = this.subject.slot;
  protected readonly said = serverWords;

  protected readonly fields = new FormRecord<FormControl<string | number | null>>(
    Object.fromEntries(
      Object.entries(shownFields(this.slot, this.reader)).map(([name, value]) => [
        name,
        new FormControl(value),
      ]),
    ),
  );
  protected readonly source = new FormControl(this.slot.figure?.source ?? '', { nonNullable: true });
  private readonly typed = signal(this.fields.getRawValue());

  constructor() {
    this.fields.valueChanges
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.typed.set(this.fields.getRawValue()));
  }

  protected wantedFields() {
    return this.slot.fields
      .filter((field) => isWanted(field, this.typed()))
      .map((field) => ({ field, control: this.fields.controls[field.name] ?? new FormControl(null) }));
  }

  protected unitOf(unit: string): string {
    return shownUnit(unit, this.reader);
  }

  protected save(): void {
    const values = storedFields(this.slot, this.fields.getRawValue(), this.reader);
    const problem = fieldsProblem(this.slot, values, this.reader);
    if (problem === null) this.saving.finish(this.slot.with(values, savedSource(this.source.value)));
    else sayAt(this.fields.get(problem.name), problem.words);
  }

  protected takeAway(): void {
    this.saving.finish(this.slot.without());
  }
}
