import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import { getAlert, getAlertTimeLine, type Alert } from '@shared/contracts/alerts';
import { dayBounds } from '@shared/series/room-days';
import { filter, interval, merge } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { LiveConnection } from '../../core/live-connection';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { RoomMembers } from '../../core/room-members';
import { Session } from '../../core/session';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { AlertCard } from '../alert-card/alert-card';
import { isValueKind } from '../alert-values';
import { EpisodeChart } from '../episode-chart/episode-chart';
import { spanAround } from '../episode-chart/span-around';
import { alertTimeLine } from './time-line';

const mailsAgainMs = 60_000;

/** One alert with what its shelf measured around it, and what happened to it. */
@Component({
  selector: 'app-alert-page',
  templateUrl: './alert-page.html',
  styleUrl: './alert-page.scss',
  imports: [AlertCard, EpisodeChart, ErrorState, LoadingLines, MatButton, MatIcon, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertPage {
  /** From the path. */
  readonly alertId = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly clock = inject(RoomClock);
  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);

  private readonly params = computed(() => {
    const roomId = this.session.roomId();
    return roomId === null ? undefined : { roomId, alertId: this.alertId() };
  });
  protected readonly resource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getAlert, { params }),
  });
  protected readonly alert = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  protected readonly toldResource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getAlertTimeLine, { params }),
  });
  /** Why the mails could not be fetched; what the alert itself says stands all the same. */
  protected readonly toldFailure = computed(() => {
    const error = this.toldResource.error();
    return error === undefined ? null : failureText(error);
  });

  private readonly steps = computed(() => {
    const alert = this.alert();
    if (alert === null) return [];
    return alertTimeLine(alert, this.toldResource.hasValue() ? this.toldResource.value() : null, {
      peak: isValueKind(alert.kind) ? this.format.value(alert.quantity, alert.peakValue) : null,
      when: (at) => this.format.when(at),
      now: this.clock.calmNow(),
    });
  });
  protected readonly marks = computed(() => this.steps().filter(({ isMark }) => isMark));
  protected readonly timeLine = computed(() =>
    this.steps().map((step) => ({ ...step, when: this.format.when(step.at) })),
  );
  /** The days around the alert, for the shelf's own page. */
  protected readonly days = computed(() => {
    const alert = this.alert();
    if (alert === null) return {};
    const span = spanAround(alert, this.clock.calmNow());
    const [from, to] = [span.from, span.to].map((at) => dayBounds(at, this.session.timeZone()).date);
    return { from, to };
  });

  constructor() {
    if (this.session.may('helper')) inject(RoomMembers).want();
    const live = inject(LiveConnection);
    const changed = live.on('alert:changed').pipe(filter(({ id }) => id === this.alertId()));
    merge(changed, live.caughtUp)
      .pipe(takeUntilDestroyed())
      .subscribe(() => {
        this.resource.reload();
        this.toldResource.reload();
      });
    // That a mail went out is no event of its own.
    interval(mailsAgainMs)
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.toldResource.reload());
  }

  /** Takes over the alert as an answer to it left it. */
  protected takeOver(alert: Alert): void {
    this.resource.set(alert);
    this.toldResource.reload();
  }
}
