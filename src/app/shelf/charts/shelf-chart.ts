import { NgTemplateOutlet } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
  model,
  output,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import type { Quantity } from '@shared/climate/quantity';
import { getSeries } from '@shared/contracts/series';
import { formatQuantityRange } from '@shared/format/quantities';
import { formatDuration } from '@shared/format/room-time';
import { maxGapMs } from '@shared/series/expected-interval';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { Chart } from '../../ui/chart/chart';
import type { ChartSpan } from '../../ui/chart/chart-data';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { keptValue } from '../kept-value';
import { quantityTitle } from '../quantity-title';
import { ShelfData } from '../shelf-data';
import { chartMarks } from './chart-marks';
import { hasReadings, shownLines, shownWanted, withLive, type LiveValue } from '../../core/shown-series';

/** One quantity of the shelf: its newest value, what is wanted of it, and its chart. */
@Component({
  selector: 'app-shelf-chart',
  templateUrl: './shelf-chart.html',
  styleUrl: './shelf-chart.scss',
  imports: [Chart, ErrorState, LoadingLines, NgTemplateOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShelfChart {
  readonly quantity = input.required<Quantity>();
  /** The part of the span that all charts are zoomed to; null for all of it. */
  readonly zoom = model<ChartSpan | null>(null);
  /** Whether there was any reading in the span, once that is known. */
  readonly readingsFound = output<boolean>();

  private readonly api = inject(ApiClient);
  private readonly data = inject(ShelfData);
  private readonly session = inject(Session);
  private readonly clock = inject(RoomClock);
  private readonly format = inject(ReaderFormat);

  protected readonly resource = rxResource({
    params: () => {
      const params = this.data.params();
      return params && { ...params, quantity: this.quantity(), query: this.data.query() };
    },
    stream: ({ params: { query, ...params } }) => this.api.call(getSeries, { params, query }),
  });
  protected readonly series = keptValue(this.resource, this.data.subject());
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  private readonly measure = computed(() => this.data.measure(this.quantity()));
  /** What came since the chart was fetched. */
  private readonly live = linkedSignal<{ series: unknown; measure: LiveValue | null }, readonly LiveValue[]>({
    source: () => ({ series: this.series(), measure: this.data.isLive() ? this.measure() : null }),
    computation: ({ series, measure }, previous) =>
      withLive(previous !== undefined && previous.source.series === series ? previous.value : [], measure),
  });

  protected readonly zone = this.session.timeZone;
  protected readonly title = computed(() => quantityTitle(this.quantity()));
  protected readonly chartTitle = computed(
    () => `${this.title()}, shelf ${this.data.detail()?.shelf.label ?? ''}`,
  );
  protected readonly lines = computed(() => {
    const series = this.series();
    return series === null ? [] : shownLines(series, this.live(), this.session.temperatureUnit());
  });
  protected readonly wanted = computed(() => {
    const series = this.series();
    return series === null ? [] : shownWanted(series, this.session.temperatureUnit());
  });
  protected readonly lamps = computed<ChartSpan[]>(() => {
    const { measuredLamps = [], plannedLamps = [] } = this.data.report() ?? {};
    const shown = measuredLamps.length > 0 ? measuredLamps : plannedLamps;
    return shown.map(({ from, to }) => ({ from: Date.parse(from), to: Date.parse(to) }));
  });
  protected readonly marks = computed(() =>
    chartMarks(
      this.quantity(),
      this.data.report()?.events ?? [],
      this.data.alerts(),
      this.data.span(),
      (alert) => this.format.describe(alert).title,
    ),
  );
  protected readonly span = computed<ChartSpan>(() => {
    const { from, to } = this.data.span();
    const last = this.live().at(-1);
    return { from, to: last === undefined ? to : Math.max(to, Date.parse(last.at)) };
  });

  /** The newest value: "24.2 °C"; null when there is none. */
  protected readonly newest = computed(() => {
    const measure = this.measure();
    return measure === null ? null : this.format.value(this.quantity(), measure.value);
  });
  /** What must be said about the newest value: its age once it is old, that it is doubtful. */
  protected readonly reservation = computed(() => {
    const measure = this.measure();
    if (measure === null) return null;
    const ageMs = this.clock.calmNow() - Date.parse(measure.at);
    if (ageMs > maxGapMs(measure.expectedIntervalS)) return `${formatDuration(ageMs)} old`;
    return measure.suspect ? 'doubtful reading' : null;
  });
  /** "want 20–26 °C lamps on, 16–20 °C lamps off"; null when nothing is wanted. */
  protected readonly wantedText = computed(() => {
    const range = this.data.detail()?.wantedRanges.find(({ quantity }) => quantity === this.quantity());
    if (range === undefined) return null;
    const [on, off] = [range.lampsOn, range.lampsOff].map((limits) =>
      formatQuantityRange(this.quantity(), limits, this.session.temperatureUnit()),
    );
    return on === off ? `want ${on}` : `want ${on} lamps on, ${off} lamps off`;
  });

  constructor() {
    effect(() => {
      const series = this.series();
      if (series !== null) this.readingsFound.emit(hasReadings(series));
    });
  }
}
