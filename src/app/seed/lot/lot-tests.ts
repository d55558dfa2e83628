import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import {
  addGerminationTest,
  countGerminationTest,
  removeGerminationTest,
  type GerminationTest,
} from '@shared/contracts/seed';
import { formatValue } from '@shared/format/numbers';
import { filter, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Asking } from '../../ui/dialogs/asking';
import { Explained } from '../../ui/explained/explained';
import { ProblemText } from '../../ui/states/problem-text';
import { shareWords, testWords } from '../seed-words';
import { LotData } from './lot-data';

const wholeNumber = Validators.pattern(/^\d+$/);
const dayField = (): FormControl<string> =>
  new FormControl('', { nonNullable: true, validators: [Validators.required] });

/** Own germination tests of the lot: so many seeds on damp paper, looked at every few days. */
@Component({
  selector: 'app-lot-tests',
  templateUrl: './lot-tests.html',
  styleUrl: './lot-tests.scss',
  imports: [Explained, MatButton, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  providers: [FormSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LotTests {
  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);
  protected readonly data = inject(LotData);

  protected readonly today = this.format.today;
  protected readonly mayCount = computed(() => this.session.may('helper'));
  protected readonly tests = computed(() =>
    (this.data.lot()?.tests ?? []).map((test) => ({
      test,
      begun: this.format.day(test.startedOn),
      words: testWords(test),
      share: test.result === null ? null : shareWords(test.result),
      times: timesOf(test),
    })),
  );

  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);
  protected readonly isBeginning = signal(false);
  /** The test that is being counted; null while none is. */
  protected readonly countingId = signal<string | null>(null);
  protected readonly beginForm = new FormGroup({
    startedOn: dayField(),
    seeds: new FormControl<number | null>(20, {
      validators: [Validators.required, Validators.min(1), Validators.max(10_000), wholeNumber],
    }),
    note: new FormControl('', { nonNullable: true }),
  });
  protected readonly countForm = new FormGroup({
    on: dayField(),
    up: new FormControl<number | null>(null, {
      validators: [Validators.required, Validators.min(0), wholeNumber],
    }),
  });

  protected openBegin(): void {
    this.beginForm.reset({ startedOn: this.today(), seeds: 20, note: '' });
    this.saving.problem.set(null);
    this.countingId.set(null);
    this.isBeginning.set(true);
  }

  protected openCount(test: GerminationTest): void {
    this.countForm.reset({ on: this.today(), up: test.counts.at(-1)?.up ?? null });
    this.saving.problem.set(null);
    this.isBeginning.set(false);
    this.countingId.set(test.id);
  }

  protected begin(): void {
    const params = this.data.params();
    const { startedOn, seeds, note } = this.beginForm.getRawValue();
    if (params === undefined || seeds === null || this.beginForm.invalid || this.saving.isSaving()) return;
    this.save(
      this.api.call(addGerminationTest, { params, body: { startedOn, seeds, note: note.trim() } }),
      this.beginForm,
      'Test begun; its seeds are taken from the lot',
    );
  }

  protected count(testId: string): void {
    const params = this.data.params();
    const { on, up } = this.countForm.getRawValue();
    if (params === undefined || up === null || this.countForm.invalid || this.saving.isSaving()) return;
    this.save(
      this.api.call(countGerminationTest, { params: { ...params, testId }, body: { on, up } }),
      this.countForm,
      `${up} germinated, noted`,
    );
  }

  protected remove(test: GerminationTest): void {
    const params = this.data.params();
    if (params === undefined) return;
    this.asking
      .ask({
        title: 'Remove this test?',
        text: 'Its counts go with it, and its seeds go back into the lot.',
        confirm: 'Remove the test',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() =>
          this.data.showing(this.api.call(removeGerminationTest, { params: { ...params, testId: test.id } })),
        ),
      )
      .subscribe({
        next: () => this.notices.say('Test removed'),
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  private save(call: Parameters<LotData['showing']>[0], form: FormGroup, done: string): void {
    this.saving.send(form, this.data.showing(call), () => {
      this.isBeginning.set(false);
      this.countingId.set(null);
      this.notices.say(done);
    });
  }
}

function timesOf({ t50Days, meanTimeDays }: GerminationTest): string {
  return [
    t50Days === null ? null : `half by day ${formatValue(t50Days, '', 1).trim()}`,
    meanTimeDays === null ? null : `mean time ${formatValue(meanTimeDays, 'days', 1)}`,
  ]
    .filter((part) => part !== null)
    .join(', ');
}
