import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import type { FrostDates } from '@shared/contracts/sowing';
import { sayMonth } from '@shared/format/room-time';
import type { FrostSeason } from '@shared/growing/frost-date';
import { frostConventions } from '@shared/growing/frost-words';
import { finalize, type Observable } from 'rxjs';
import type * as z from 'zod';
import type { frostDatesEntry } from '@shared/contracts/sowing';
import { failureText } from '../../core/failure-text';
import { ProblemText } from '../../ui/states/problem-text';
import { frostForm, frostProblem, savedFrost, type FrostDateForm } from './frost-fields';
import { statedRisk, wordingChoices } from './frost-words';

/** The frost dates as they are, and how others are kept. */
export interface FrostSubject {
  readonly frost: FrostDates;
  readonly save: (entry: z.input<typeof frostDatesEntry>) => Observable<FrostDates>;
}

/** Sets the frost dates of the room's place. Closes with true once they are saved. */
@Component({
  selector: 'app-frost-dialog',
  templateUrl: './frost-dialog.html',
  styleUrl: '../sowing-dialog.scss',
  imports: [
    MatButton,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FrostDialog {
  private readonly dialog = inject<MatDialogRef<FrostDialog, boolean>>(MatDialogRef);
  private readonly subject = inject<FrostSubject>(MAT_DIALOG_DATA);

  protected readonly form = frostForm(this.subject.frost);
  protected readonly choices = wordingChoices;
  protected readonly conventions = frostConventions;
  protected readonly months = Array.from({ length: 12 }, (_, month) => ({
    month: month + 1,
    name: sayMonth(`2026-${String(month + 1).padStart(2, '0')}`).replace(' 2026', ''),
  }));
  protected readonly dates = [
    this.date('Last frost in spring', 'lastSpring', 'spring'),
    this.date('First frost in autumn', 'firstAutumn', 'autumn'),
  ];
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  protected save(): void {
    const found = this.dates.map(({ fields, name }) => frostProblem(fields, name));
    const problem = found.find((one) => one !== null) ?? null;
    this.problem.set(problem);
    if (problem !== null) return;
    this.isSaving.set(true);
    this.subject
      .save(savedFrost(this.form))
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: () => this.dialog.close(true),
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }

  private date(name: string, key: 'lastSpring' | 'firstAutumn', season: FrostSeason) {
    const fields: FrostDateForm = this.form.controls[key];
    const changed = toSignal(fields.valueChanges, { initialValue: fields.value });
    const stated = computed(() => {
      const { kind = 'average', percent = null } = changed();
      return {
        needsPercent: kind !== 'average',
        help: wordingChoices.find((choice) => choice.kind === kind)?.help ?? '',
        risk: statedRisk(kind, percent, season),
      };
    });
    return { name, key, fields, stated };
  }
}
