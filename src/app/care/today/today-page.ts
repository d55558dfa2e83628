import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { listTasks } from '@shared/contracts/care';
import { DateTime } from 'luxon';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { EmptyState } from '../../ui/states/empty-state';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';

/** What is to be done today, and what is late. */
@Component({
  selector: 'app-today-page',
  templateUrl: './today-page.html',
  styleUrl: './today-page.scss',
  imports: [EmptyState, ErrorState, LoadingLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TodayPage {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly format = inject(ReaderFormat);

  protected readonly tasks = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId, from: this.format.today() };
    },
    stream: ({ params: { roomId, from } }) =>
      this.api.call(listTasks, { params: { roomId }, query: { from, to: dayAfter(from) } }),
  });
  protected readonly problem = computed(() => {
    const error = this.tasks.error();
    return error === undefined ? null : failureText(error);
  });
}

function dayAfter(day: string): string {
  return DateTime.fromISO(day, { zone: 'UTC' }).plus({ days: 1 }).toFormat('yyyy-MM-dd');
}
