import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import { listLoggerFiles, removeLoggerFile, type LoggerFile } from '@shared/contracts/logger-files';
import { filter, finalize, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { LiveConnection } from '../../core/live-connection';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Asking } from '../../ui/dialogs/asking';
import { EmptyState } from '../../ui/states/empty-state';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { isAtWork, readingWords, removalWords, sizeWords, spanWords, statusWords } from '../file-words';
import { ProfileList } from './profile-list';

/** The room's logger files: who brought in what and when, and the way to bring in another. */
@Component({
  selector: 'app-loggers-page',
  templateUrl: './loggers-page.html',
  styleUrl: './loggers-page.scss',
  imports: [EmptyState, ErrorState, LoadingLines, MatButton, MatIcon, MatIconButton, ProfileList, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LoggersPage {
  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  private readonly params = computed(() => {
    const roomId = this.session.roomId();
    return roomId === null ? undefined : { roomId };
  });
  protected readonly resource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(listLoggerFiles, { params, query: {} }),
  });
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });
  protected readonly files = computed(() =>
    this.resource.hasValue() ? this.resource.value().files.map((file) => this.line(file)) : null,
  );
  protected readonly nextCursor = computed(() =>
    this.resource.hasValue() ? this.resource.value().nextCursor : null,
  );
  protected readonly isLoadingMore = signal(false);
  protected readonly mayBringIn = computed(() => this.session.may('grower'));

  constructor() {
    const live = inject(LiveConnection);
    live
      .on('loggerFile:changed')
      .pipe(takeUntilDestroyed())
      .subscribe((file) => this.takeOver(file));
    live.caughtUp.pipe(takeUntilDestroyed()).subscribe(() => this.resource.reload());
  }

  protected showMore(): void {
    const [params, cursor] = [this.params(), this.nextCursor()];
    if (params === undefined || cursor === null) return;
    this.isLoadingMore.set(true);
    this.api
      .call(listLoggerFiles, { params, query: { cursor } })
      .pipe(finalize(() => this.isLoadingMore.set(false)))
      .subscribe({
        next: (page) =>
          this.resource.update((held) => ({ ...page, files: [...(held?.files ?? []), ...page.files] })),
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  protected remove(file: LoggerFile): void {
    const params = this.params();
    if (params === undefined) return;
    this.asking
      .ask({
        title: `Remove ${file.name}?`,
        text: removalWords(file),
        confirm: 'Remove the file',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() => this.api.call(removeLoggerFile, { params: { ...params, fileId: file.id } })),
      )
      .subscribe({
        next: () => {
          this.resource.update(
            (held) => held && { ...held, files: held.files.filter(({ id }) => id !== file.id) },
          );
          this.notices.say(`${file.name} removed`);
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  private takeOver(file: LoggerFile): void {
    // To change a resource that is still loading would break the loading off for good.
    if (!this.resource.hasValue()) return;
    this.resource.update((held) => {
      if (held === undefined) return held;
      const isKnown = held.files.some(({ id }) => id === file.id);
      const files = isKnown
        ? held.files.map((one) => (one.id === file.id ? file : one))
        : [file, ...held.files];
      return { ...held, files };
    });
  }

  private line(file: LoggerFile) {
    const { result, status } = file;
    const zone = this.session.timeZone();
    const counts =
      result === null || !['checked', 'broughtIn'].includes(status)
        ? []
        : [
            `${readingWords(result.fresh)} new`,
            ...(result.rejected > 0 ? [`${readingWords(result.rejected)} not usable`] : []),
            spanWords(result.from, result.to, zone),
          ];
    return {
      file,
      status: statusWords[status],
      isDone: status === 'broughtIn',
      isAtWork: isAtWork(file),
      origin: [
        file.uploadedByName,
        this.format.when(file.uploadedAt),
        sizeWords(file.byteSize),
        file.profileName,
      ]
        .filter((part) => part !== null)
        .join(' · '),
      outcome:
        status === 'failed'
          ? (file.failure?.message ?? '')
          : counts.filter((part) => part !== null).join(' · '),
    };
  }
}
