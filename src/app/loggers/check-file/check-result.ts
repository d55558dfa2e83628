import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatRadioModule } from '@angular/material/radio';
import type { DifferingChoice, LoggerFileDetail } from '@shared/contracts/logger-files';
import { formatNumber } from '@shared/format/numbers';
import { Session } from '../../core/session';
import { NoteLine } from '../../ui/note-line/note-line';
import { readingWords } from '../file-words';
import { OffShelfReadings } from './off-shelf-readings';
import { resultRows, storedCount } from './result-rows';
import { UnusableLines } from './unusable-lines';

/** The third step: what reading the whole file found, before anything is stored. */
@Component({
  selector: 'app-check-result',
  templateUrl: './check-result.html',
  styleUrl: './check-result.scss',
  imports: [MatButton, MatRadioModule, NoteLine, OffShelfReadings, UnusableLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CheckResult {
  readonly file = input.required<LoggerFileDetail>();
  readonly mayBringIn = input.required<boolean>();
  readonly isBusy = input.required<boolean>();
  readonly bringInChosen = output<DifferingChoice>();
  readonly matchChosen = output();

  private readonly zone = inject(Session).timeZone;

  protected readonly differing = signal<DifferingChoice>('keep');
  protected readonly result = computed(() => this.file().result);
  protected readonly rows = computed(() => {
    const result = this.result();
    return result === null ? [] : resultRows(result, this.zone());
  });
  protected readonly offShelf = computed(() => this.result()?.offShelf ?? []);
  protected readonly different = computed(() => formatNumber(this.result()?.different ?? 0, 0));
  protected readonly stored = computed(() => {
    const result = this.result();
    return result === null ? 0 : storedCount(result, this.differing());
  });
  protected readonly deed = computed(() => `Bring in ${readingWords(this.stored())}`);
}
