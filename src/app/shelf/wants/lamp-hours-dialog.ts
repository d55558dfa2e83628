import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { setLampHours, type LampHours } from '@shared/contracts/rooms';
import { finalize } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { ProblemText } from '../../ui/states/problem-text';

/** Whose lamp hours are changed, and what they are. */
export interface LampHoursSubject {
  readonly params: { readonly roomId: string; readonly shelfId: string };
  readonly lampHours: LampHours;
}

/** Changes the hours that lamps are planned on. Closes with true once they are saved. */
@Component({
  selector: 'app-lamp-hours-dialog',
  templateUrl: './lamp-hours-dialog.html',
  styleUrl: './dialog-form.scss',
  imports: [
    MatButton,
    MatCheckbox,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    ProblemText,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LampHoursDialog {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject<MatDialogRef<LampHoursDialog, boolean>>(MatDialogRef);
  private readonly subject = inject<LampHoursSubject>(MAT_DIALOG_DATA);

  protected readonly fields = new FormGroup({
    isDark: new FormControl(this.subject.lampHours.switchesOn === null, { nonNullable: true }),
    switchesOn: new FormControl(this.subject.lampHours.switchesOn ?? '06:00', { nonNullable: true }),
    switchesOff: new FormControl(this.subject.lampHours.switchesOff ?? '22:00', { nonNullable: true }),
  });
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  protected save(): void {
    const { isDark, switchesOn, switchesOff } = this.fields.getRawValue();
    if (!isDark && (switchesOn === '' || switchesOff === '')) {
      this.problem.set('Give both times, or keep the shelf dark.');
      return;
    }
    this.problem.set(null);
    this.isSaving.set(true);
    const body = isDark ? { switchesOn: null, switchesOff: null } : { switchesOn, switchesOff };
    this.api
      .call(setLampHours, { params: this.subject.params, body })
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: () => this.dialog.close(true),
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }
}
