import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatDuration } from '@shared/format/room-time';
import { dayAfter } from '@shared/growing/calendar-day';
import { failureText } from '../../../core/failure-text';
import { ErrorState } from '../../../ui/states/error-state';
import { RotaData } from '../rota-data';
import { dayTitle } from '../week/week-words';

const minuteMs = 60_000;

/** How care is shared out: what each person did and has still to do, by name. */
@Component({
  selector: 'app-share-card',
  template: `
    <h2>How it is shared</h2>
    <p>{{ spanWords() }}. New tasks go to whoever has the fewest minutes.</p>
    @if (lines(); as lines) {
      <table>
        <thead>
          <tr>
            <th scope="col">Person</th>
            <th scope="col">Done</th>
            <th scope="col">Still to do</th>
          </tr>
        </thead>
        <tbody>
          @for (line of lines; track line.personId) {
            <tr>
              <th scope="row">{{ line.name }}</th>
              <td>
                {{ line.done.tasks }} <small>{{ line.done.time }}</small>
              </td>
              <td>
                {{ line.open.tasks }} <small>{{ line.open.time }}</small>
              </td>
            </tr>
          }
        </tbody>
      </table>
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="data.shareResource.reload()" />
    }
  `,
  styleUrl: '../rota-card.scss',
  imports: [ErrorState],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShareCard {
  protected readonly data = inject(RotaData);

  protected readonly spanWords = computed(() => {
    const { from, to } = this.data.shareSpan();
    return `${dayTitle(from)} to ${dayTitle(dayAfter(to, -1))}`;
  });
  protected readonly lines = computed(() => {
    if (!this.data.shareResource.hasValue()) return null;
    return this.data.shareResource.value().shares.map((share) => ({
      personId: share.personId,
      name: share.name,
      done: amount(share.doneTasks, share.doneMinutes),
      open: amount(share.openTasks, share.openMinutes),
    }));
  });
  protected readonly failure = computed(() => {
    const error = this.data.shareResource.error();
    return error === undefined ? null : failureText(error);
  });
}

/** "4 tasks" and "1 h 10 min" */
function amount(tasks: number, minutes: number): { readonly tasks: string; readonly time: string } {
  if (tasks === 0) return { tasks: 'none', time: '' };
  return { tasks: tasks === 1 ? '1 task' : `${tasks} tasks`, time: formatDuration(minutes * minuteMs) };
}
