import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import { downloadLoggerFile, type LoggerFileDetail } from '@shared/contracts/logger-files';
import { dayBounds } from '@shared/series/room-days';
import { filter } from 'rxjs';
import { apiPath } from '../../core/api-client';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Asking } from '../../ui/dialogs/asking';
import { storedCount } from '../check-file/result-rows';
import { UnusableLines } from '../check-file/unusable-lines';
import { readingWords, removalWords, spanWords } from '../file-words';
import { LoggerFileData } from '../logger-file-data';
import { restWords } from './rest-words';

/** The file is in: what was stored, and the way to see it. */
@Component({
  selector: 'app-bring-in-result',
  templateUrl: './bring-in-result.html',
  styleUrl: './bring-in-result.scss',
  imports: [MatButton, MatIcon, RouterLink, UnusableLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BringInResult {
  readonly file = input.required<LoggerFileDetail>();
  readonly mayTakeOut = input.required<boolean>();

  private readonly asking = inject(Asking);
  private readonly data = inject(LoggerFileData);
  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);

  protected readonly stored = computed(() => {
    const { result, differing } = this.file();
    return readingWords(result === null ? 0 : storedCount(result, differing ?? 'keep'));
  });
  protected readonly original = computed(() =>
    apiPath(downloadLoggerFile.path, { roomId: this.session.roomId(), fileId: this.file().id }),
  );
  protected readonly when = computed(() => {
    const { broughtInAt, broughtInByName, result } = this.file();
    const by = broughtInByName === null ? '' : ` by ${broughtInByName}`;
    const at = broughtInAt === null ? null : `Brought in ${this.format.when(broughtInAt)}${by}`;
    const span = spanWords(result?.from ?? null, result?.to ?? null, this.session.timeZone());
    return [at, span].filter((part) => part !== null).join(' · ');
  });
  protected readonly rejected = computed(() => this.file().result?.rejected ?? 0);
  protected readonly rest = computed(() => restWords(this.file()));

  /** The shelves whose charts now show the file, at its own days. */
  protected readonly shelves = computed(() => {
    const { series, result } = this.file();
    if (result === null || result.from === null || result.to === null) return [];
    const zone = this.session.timeZone();
    const [from, to] = [result.from, result.to].map((at) => dayBounds(Date.parse(at), zone).date);
    const sensorIds = new Set(series.map(({ sensorId }) => sensorId));
    // A sensor that was made for the file is not among those known before.
    const shelfIds = new Set([
      ...series.map(({ newSensor }) => newSensor?.shelfId),
      ...this.data.sensors().flatMap(({ id, shelfId }) => (sensorIds.has(id) ? [shelfId] : [])),
    ]);
    return this.data
      .shelves()
      .filter(({ id }) => shelfIds.has(id))
      .map(({ id, label }) => ({ shelfId: id, label, days: { from, to } }));
  });

  protected takeOut(): void {
    this.asking
      .ask({
        title: `Take ${this.file().name} out again?`,
        text: `${removalWords(this.file())} The file itself stays here.`,
        confirm: 'Take it out',
        isDestructive: true,
      })
      .pipe(filter(Boolean))
      .subscribe(() => this.data.takeOut());
  }
}
