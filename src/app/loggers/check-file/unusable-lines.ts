import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { downloadRejections, listRejections } from '@shared/contracts/logger-files';
import { formatNumber } from '@shared/format/numbers';
import { finalize } from 'rxjs';
import { apiPath, ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';

/** The lines of a file that can't be used, a page at a time, or all of them as CSV. */
@Component({
  selector: 'app-unusable-lines',
  templateUrl: './unusable-lines.html',
  styleUrl: './unusable-lines.scss',
  imports: [ErrorState, LoadingLines, MatButton, MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UnusableLines {
  readonly fileId = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  protected readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId, fileId: this.fileId() };
    },
    stream: ({ params }) => this.api.call(listRejections, { params, query: {} }),
  });
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });
  protected readonly page = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  protected readonly total = computed(() => formatNumber(this.page()?.total ?? 0, 0));
  protected readonly csvAddress = computed(() =>
    apiPath(downloadRejections.path, { roomId: this.session.roomId(), fileId: this.fileId() }),
  );
  protected readonly isAsking = signal(false);

  protected showMore(): void {
    const [after, roomId] = [this.page()?.nextAfter ?? null, this.session.roomId()];
    if (after === null || roomId === null) return;
    this.isAsking.set(true);
    this.api
      .call(listRejections, { params: { roomId, fileId: this.fileId() }, query: { after } })
      .pipe(finalize(() => this.isAsking.set(false)))
      .subscribe({
        next: (next) =>
          this.resource.update((held) => ({
            ...next,
            rejections: [...(held?.rejections ?? []), ...next.rejections],
          })),
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }
}
