import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import { recountSeedLot, type SeedLotDetail } from '@shared/contracts/seed';
import { ApiClient } from '../../core/api-client';
import { serverWords } from '../../core/field-problems';
import { FormSaving } from '../../core/form-saving';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { ProblemText } from '../../ui/states/problem-text';
import { amountWords, leftWords } from '../seed-words';
import { LotData } from './lot-data';

type SeedUse = SeedLotDetail['uses'][number];

const useWords: Readonly<Record<SeedUse['reason'], string>> = {
  sown: 'sown',
  tested: 'on damp paper',
  recounted: 'recounted',
};

/** What is left of the lot, what was taken, and a recount for when the packet says otherwise. */
@Component({
  selector: 'app-lot-left',
  templateUrl: './lot-left.html',
  styleUrl: './lot-card.scss',
  imports: [MatButton, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule, RouterLink],
  providers: [FormSaving],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LotLeft {
  private readonly api = inject(ApiClient);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  protected readonly data = inject(LotData);

  protected readonly left = computed(() => {
    const lot = this.data.lot();
    return lot === null ? '' : leftWords(lot);
  });
  protected readonly unitWord = computed(() => (this.data.lot()?.unit === 'grams' ? 'g' : 'seeds'));
  protected readonly uses = computed(() => {
    const lot = this.data.lot();
    return (lot?.uses ?? []).map((use) => ({
      id: use.id,
      amount: use.amount < 0 ? `+ ${this.amount(-use.amount)}` : `− ${this.amount(use.amount)}`,
      words: [useWords[use.reason], use.note].filter(Boolean).join(': '),
      origin: [this.format.when(use.at), use.personName].filter((part) => part !== null).join(' · '),
      plantingId: use.plantingId,
    }));
  });

  protected readonly said = serverWords;
  protected readonly saving = inject(FormSaving);
  protected readonly isCounting = signal(false);
  protected readonly form = new FormGroup({
    left: new FormControl<number | null>(null, {
      validators: [Validators.required, Validators.min(0), Validators.max(1_000_000)],
    }),
    note: new FormControl('', { nonNullable: true }),
  });

  protected begin(): void {
    this.form.reset({ left: this.data.lot()?.left ?? null, note: '' });
    this.saving.problem.set(null);
    this.isCounting.set(true);
  }

  protected save(): void {
    const params = this.data.params();
    const { left, note } = this.form.getRawValue();
    if (params === undefined || left === null || this.form.invalid || this.saving.isSaving()) return;
    this.saving.send(
      this.form,
      this.data.showing(this.api.call(recountSeedLot, { params, body: { left, note: note.trim() } })),
      () => {
        this.isCounting.set(false);
        this.notices.say(`${this.left()} written down`);
      },
    );
  }

  private amount(amount: number): string {
    return amountWords(amount, this.data.lot()?.unit ?? 'seeds');
  }
}
