import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { clearWantedLight, setWantedLight, type WantedLight } from '@shared/contracts/rooms';
import { getShelfReport } from '@shared/contracts/series';
import { dayBounds } from '@shared/series/room-days';
import { finalize, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';
import { lightTrialWords } from './light-trial';

/** On which shelf the light of a day is changed, and what it is. */
export interface WantedLightSubject {
  readonly params: { readonly roomId: string; readonly shelfId: string };
  /** Null to set a first one. */
  readonly light: WantedLight | null;
}

const TRIAL_MS = 14 * 86_400_000;
const mostMolM2 = 100;

/** Changes the least light that a day on a shelf should come to. Closes with true once that is saved. */
@Component({
  selector: 'app-wanted-light-dialog',
  templateUrl: './wanted-light-dialog.html',
  styleUrl: './dialog-form.scss',
  imports: [MatButton, MatDialogModule, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WantedLightDialog {
  private readonly api = inject(ApiClient);
  private readonly dialog = inject<MatDialogRef<WantedLightDialog, boolean>>(MatDialogRef);
  private readonly session = inject(Session);
  private readonly subject = inject<WantedLightSubject>(MAT_DIALOG_DATA);
  /** Whole days that are over. */
  private readonly until = dayBounds(inject(RoomClock).now(), this.session.timeZone()).start;

  protected readonly fields = new FormGroup({
    leastMolM2D: new FormControl<number | null>(this.subject.light?.leastMolM2D ?? null),
    reason: new FormControl(this.subject.light?.source === 'shelf' ? this.subject.light.reason : '', {
      nonNullable: true,
    }),
  });
  private readonly typed = toSignal(this.fields.controls.leastMolM2D.valueChanges, {
    initialValue: this.fields.controls.leastMolM2D.value,
  });
  protected readonly isByHand = this.subject.light?.source === 'shelf';
  protected readonly origin =
    this.subject.light?.source === 'plantings'
      ? `This one comes from what grows here (${this.subject.light.reason}); one that you save takes its place.`
      : '';

  private readonly report = rxResource({
    stream: () =>
      this.api.call(getShelfReport, {
        params: this.subject.params,
        query: {
          from: new Date(this.until - TRIAL_MS).toISOString(),
          to: new Date(this.until).toISOString(),
        },
      }),
  });
  protected readonly trial = computed(() => {
    const least = this.typed();
    if (leastProblem(least) !== null || least === null) {
      return 'Give a sum that can be kept, and see what it would have done.';
    }
    if (this.report.error() !== undefined) return failureText(this.report.error());
    if (!this.report.hasValue()) return 'Trying it on the last two weeks…';
    return lightTrialWords(least, this.report.value().light, this.session.timeZone());
  });

  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);

  protected save(): void {
    const { leastMolM2D, reason } = this.fields.getRawValue();
    const problem = leastProblem(leastMolM2D);
    this.problem.set(problem);
    if (problem !== null || leastMolM2D === null) return;
    const body = { leastMolM2D, reason };
    this.finish(this.api.call(setWantedLight, { params: this.subject.params, body }));
  }

  protected leaveToPlantings(): void {
    this.finish(this.api.call(clearWantedLight, { params: this.subject.params }));
  }

  private finish(call: Observable<unknown>): void {
    this.isSaving.set(true);
    call.pipe(finalize(() => this.isSaving.set(false))).subscribe({
      next: () => this.dialog.close(true),
      error: (error: unknown) => this.problem.set(failureText(error)),
    });
  }
}

function leastProblem(least: number | null): string | null {
  return least === null || !(least >= 0 && least <= mostMolM2)
    ? `Give a sum from 0 to ${mostMolM2} mol/m²; 0 is any light at all.`
    : null;
}
