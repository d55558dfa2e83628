import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { belowKinds, silenceKinds, type AlertKind } from '@shared/alerts/alert-rule';
import type { Alert } from '@shared/contracts/alerts';
import { getSeries } from '@shared/contracts/series';
import { formatQuantity, quantityName, shownValue } from '@shared/format/quantities';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { shownLines, shownWanted } from '../../core/shown-series';
import { Chart } from '../../ui/chart/chart';
import type { ChartLimit, ChartMark } from '../../ui/chart/chart-data';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { isValueKind } from '../alert-values';
import { spanAround } from './span-around';

const minuteMs = 60_000;

/** What was measured around an alert: the line, what was wanted, the limit that was passed, and what happened. */
@Component({
  selector: 'app-episode-chart',
  template: `
    @if (chart(); as chart) {
      <app-chart
        [title]="title()"
        [lines]="chart.lines"
        [wanted]="chart.wanted"
        [limit]="limit()"
        [zone]="zone()"
        [marks]="marks()"
        [span]="span()"
      >
        <div>
          <ng-content />
          <p>{{ legend() }}</p>
        </div>
      </app-chart>
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="resource.reload()" />
    } @else {
      <app-loading-lines [lines]="5" label="Loading the chart" />
    }
  `,
  styles: `
    :host {
      display: block;
      min-width: 0;
    }

    p {
      margin: 0;
      color: var(--ink-2);
      font-size: 0.84375rem;
    }
  `,
  imports: [Chart, ErrorState, LoadingLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EpisodeChart {
  readonly alert = input.required<Alert>();
  readonly marks = input<readonly ChartMark[]>([]);

  private readonly api = inject(ApiClient);
  private readonly clock = inject(RoomClock);
  private readonly session = inject(Session);

  /** The present to the minute. */
  private readonly minute = computed(() => Math.floor(this.clock.calmNow() / minuteMs) * minuteMs);
  /** What is drawn; made anew only when the alert has another length, not with every second that passes. */
  private readonly window = computed(
    () => {
      const roomId = this.session.roomId();
      if (roomId === null) return undefined;
      const { shelfId, quantity } = this.alert();
      return { params: { roomId, shelfId, quantity }, ...spanAround(this.alert(), this.minute()) };
    },
    { equal: (a, b) => a?.from === b?.from && a?.to === b?.to },
  );
  protected readonly resource = rxResource({
    params: this.window,
    stream: ({ params: { params, from, to } }) =>
      this.api.call(getSeries, {
        params,
        query: { from: new Date(from).toISOString(), to: new Date(to).toISOString() },
      }),
  });
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  protected readonly zone = this.session.timeZone;
  protected readonly span = computed(() => this.window() ?? null);
  protected readonly chart = computed(() => {
    if (!this.resource.hasValue()) return null;
    const [series, unit] = [this.resource.value(), this.session.temperatureUnit()];
    return { lines: shownLines(series, [], unit), wanted: shownWanted(series, unit) };
  });
  protected readonly title = computed(
    () => `${quantityName[this.alert().quantity]} around this alert, shelf ${this.alert().shelfLabel}`,
  );
  protected readonly limit = computed<ChartLimit | null>(() => {
    const { kind, quantity, peakLimit, beganAt, endedAt } = this.alert();
    if (!isValueKind(kind)) return null;
    return {
      value: shownValue(quantity, peakLimit, this.session.temperatureUnit()),
      isUpper: !(belowKinds as readonly AlertKind[]).includes(kind),
      from: Date.parse(beganAt),
      to: endedAt === null ? this.minute() : Date.parse(endedAt),
    };
  });
  /** What the marks of the drawing mean. */
  protected readonly legend = computed(() => {
    const { kind, quantity, peakLimit } = this.alert();
    if ((silenceKinds as readonly AlertKind[]).includes(kind)) return 'Up to the silence.';
    const hasBand = (this.chart()?.wanted.length ?? 0) > 0;
    const limit = formatQuantity(quantity, peakLimit, this.session.temperatureUnit());
    const parts = [
      ...(hasBand ? ['green is what is wanted'] : []),
      ...(this.limit() === null ? [] : [`dashed is the limit, ${limit}`]),
    ];
    const words = parts.join('; ');
    return words === '' ? '' : `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;
  });
}
