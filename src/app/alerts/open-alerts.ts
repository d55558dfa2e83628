import { ChangeDetectionStrategy, Component, computed, inject, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { Alert } from '@shared/contracts/alerts';
import { AlertFeed } from '../core/alert-feed';
import { AlertInbox } from '../core/alert-inbox';
import { isQuiet } from '../core/alert-words';
import { failureText } from '../core/failure-text';
import { RoomClock } from '../core/room-clock';
import type { ChartMark } from '../ui/chart/chart-data';
import { EmptyState } from '../ui/states/empty-state';
import { ErrorState } from '../ui/states/error-state';
import { LoadingLines } from '../ui/states/loading-lines';
import { AlertCard } from './alert-card/alert-card';
import { EpisodeChart } from './episode-chart/episode-chart';

/** What is wrong in the room now, with what was measured: what is urgent first, what is quiet last. */
@Component({
  selector: 'app-open-alerts',
  template: `
    @if (alerts(); as alerts) {
      @for (one of alerts; track one.alert.id) {
        <app-alert-card [alert]="one.alert">
          <div chart>
            <!-- Readings are fetched for what is looked at only. -->
            @defer (on viewport; prefetch on idle) {
              <app-episode-chart [alert]="one.alert" [marks]="one.marks" />
            } @placeholder {
              <div class="place"></div>
            }
          </div>
        </app-alert-card>
      } @empty {
        <app-empty-state
          icon="check_circle"
          title="Nothing needs a look"
          text="Every shelf that is watched is as it should be. What was wrong before stands under “All”."
        >
          <button matButton="outlined" type="button" (click)="historyWanted.emit()">Show all alerts</button>
        </app-empty-state>
      }
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="feed.refresh()" />
    } @else {
      <app-loading-lines [lines]="6" label="Loading the alerts" />
    }
  `,
  styles: `
    :host {
      display: grid;
      grid-template-columns: minmax(0, 1fr);
      gap: 12px;
      max-width: 860px;
      --plot-height: 160px;
    }

    .place {
      min-height: 200px;
    }
  `,
  imports: [AlertCard, EmptyState, EpisodeChart, ErrorState, LoadingLines, MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OpenAlerts {
  /** Somebody wants to see those that are over. */
  readonly historyWanted = output();

  private readonly clock = inject(RoomClock);
  private readonly inbox = inject(AlertInbox);
  protected readonly feed = inject(AlertFeed);

  protected readonly alerts = computed(() => {
    const open = this.inbox.open();
    const now = this.clock.calmNow();
    return (
      open &&
      [...open]
        .sort((a, b) => rankOf(a, now) - rankOf(b, now))
        .map((alert) => ({ alert, marks: marksOf(alert) }))
    );
  });
  protected readonly failure = computed(() => {
    const failure = this.feed.failure();
    return failure === null ? null : failureText(failure);
  });
}

function rankOf(alert: Alert, now: number): number {
  if (isQuiet(alert, now)) return 2;
  return alert.urgency === 'goNow' ? 0 : 1;
}

/** What people did, as the chart marks it. */
function marksOf({ openedAt, acknowledgedAt, acknowledgedByName, deeds }: Alert): ChartMark[] {
  return [
    { at: Date.parse(openedAt), icon: 'notifications', text: 'Alert opened' },
    ...(acknowledgedAt === null
      ? []
      : [
          {
            at: Date.parse(acknowledgedAt),
            icon: 'visibility',
            text: `Seen by ${acknowledgedByName ?? 'somebody who has left'}`,
          },
        ]),
    ...deeds.map(({ at, text }) => ({ at: Date.parse(at), icon: 'handyman', text })),
  ];
}
