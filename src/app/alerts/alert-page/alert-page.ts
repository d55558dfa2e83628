import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import { silenceKinds, type AlertKind } from '@shared/alerts/alert-rule';
import { getAlert } from '@shared/contracts/alerts';
import { getSeries } from '@shared/contracts/series';
import { quantityName } from '@shared/format/quantities';
import { dayBounds } from '@shared/series/room-days';
import { filter, merge } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { LiveConnection } from '../../core/live-connection';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { shownLines, shownWanted } from '../../core/shown-series';
import { Chart } from '../../ui/chart/chart';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { AlertCard } from '../alert-card/alert-card';
import { alertTimeLine, spanAround } from './time-line';

/** Kinds whose peak is a value of the quantity itself. */
const valueKinds: readonly AlertKind[] = [
  'aboveRange',
  'belowRange',
  'dangerHigh',
  'dangerLow',
  'lampDark',
  'lampLit',
];

/** One alert with what its shelf measured around it, and what happened to it. */
@Component({
  selector: 'app-alert-page',
  templateUrl: './alert-page.html',
  styleUrl: './alert-page.scss',
  imports: [AlertCard, Chart, ErrorState, LoadingLines, MatButton, MatIcon, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertPage {
  /** From the path. */
  readonly alertId = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly clock = inject(RoomClock);
  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);

  protected readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId, alertId: this.alertId() };
    },
    stream: ({ params }) => this.api.call(getAlert, { params }),
  });
  protected readonly alert = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  /** What is drawn; made anew only when the alert has another length, not with every second that passes. */
  private readonly window = computed(
    () => {
      const [alert, roomId] = [this.alert(), this.session.roomId()];
      if (alert === null || roomId === null) return undefined;
      const { shelfId, quantity } = alert;
      return { params: { roomId, shelfId, quantity }, ...spanAround(alert, this.minute()) };
    },
    { equal: (a, b) => a?.from === b?.from && a?.to === b?.to },
  );
  /** The present to the minute. */
  private readonly minute = computed(() => Math.floor(this.clock.calmNow() / 60_000) * 60_000);
  private readonly seriesResource = rxResource({
    params: this.window,
    stream: ({ params: { params, from, to } }) =>
      this.api.call(getSeries, {
        params,
        query: { from: new Date(from).toISOString(), to: new Date(to).toISOString() },
      }),
  });

  protected readonly zone = this.session.timeZone;
  protected readonly span = computed(() => this.window() ?? null);
  protected readonly chart = computed(() => {
    if (!this.seriesResource.hasValue()) return null;
    const [series, unit] = [this.seriesResource.value(), this.session.temperatureUnit()];
    return { lines: shownLines(series, [], unit), wanted: shownWanted(series, unit) };
  });
  protected readonly title = computed(() => {
    const alert = this.alert();
    return alert === null
      ? ''
      : `${quantityName[alert.quantity]} around this alert, shelf ${alert.shelfLabel}`;
  });
  protected readonly steps = computed(() => {
    const alert = this.alert();
    if (alert === null) return [];
    const isValue = valueKinds.includes(alert.kind);
    return alertTimeLine(alert, isValue ? this.format.value(alert.quantity, alert.peakValue) : null);
  });
  protected readonly timeLine = computed(() =>
    this.steps().map((step) => ({ ...step, when: this.format.when(step.at) })),
  );
  protected readonly isSilence = computed(() => {
    const kind = this.alert()?.kind;
    return (silenceKinds as readonly (AlertKind | undefined)[]).includes(kind);
  });
  /** The days around the alert, for the shelf's own page. */
  protected readonly days = computed(() => {
    const window = this.window();
    if (window === undefined) return {};
    const [from, to] = [window.from, window.to].map((at) => dayBounds(at, this.zone()).date);
    return { from, to };
  });

  constructor() {
    const live = inject(LiveConnection);
    const changed = live.on('alert:changed').pipe(filter(({ id }) => id === this.alertId()));
    merge(changed, live.caughtUp)
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.resource.reload());
  }
}
