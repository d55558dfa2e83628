import { DOCUMENT } from '@angular/common';
import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  ElementRef,
  effect,
  inject,
  input,
  model,
  signal,
  untracked,
} from '@angular/core';
import { MatIconButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatMenu, MatMenuContent, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import type { ECharts } from 'echarts';
import { NgxEchartsDirective, provideEchartsCore } from 'ngx-echarts';
import { sayWhen } from '@shared/format/room-time';
import { ThemeChoice } from '../theme/theme-choice';
import { readChartColours } from './chart-colours';
import {
  spanOfLines,
  type ChartLimit,
  type ChartLine,
  type ChartMark,
  type ChartSpan,
  type WantedSpan,
} from './chart-data';
import { chartOption, zoomOption } from './chart-option';
import { chartSummary } from './chart-summary';
import { chartCsv, chartTable } from './chart-table';
import { ChartNumbers } from './chart-numbers';
import { isSameSpan, movedSpan, spanShownBy, zoomedSpan } from './chart-zoom';
import { saveFile } from './save-file';

/**
 * Lines over time in the room's own time: the wanted range as a band that steps with the lamps, lamp hours on top,
 * what is outside drawn heavier, gaps left open. Its numbers can be read as a table and saved.
 * A heading may be projected; it stands before the buttons.
 */
@Component({
  selector: 'app-chart',
  templateUrl: './chart.html',
  styleUrl: './chart.scss',
  imports: [
    ChartNumbers,
    MatIcon,
    MatIconButton,
    MatMenu,
    MatMenuContent,
    MatMenuItem,
    MatMenuTrigger,
    NgxEchartsDirective,
  ],
  providers: [provideEchartsCore({ echarts: () => import('./echarts-parts') })],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Chart {
  /** What the chart shows, for its heading by screen reader and its file names: "Air, shelf A1". */
  readonly title = input.required<string>();
  readonly lines = input.required<readonly ChartLine[]>();
  /** IANA name of the room's time zone. */
  readonly zone = input.required<string>();
  /** The range wanted of the first line, which alone is judged. */
  readonly wanted = input<readonly WantedSpan[]>([]);
  readonly lamps = input<readonly ChartSpan[]>([]);
  /** Spans to shade. */
  readonly nights = input<readonly ChartSpan[]>([]);
  readonly marks = input<readonly ChartMark[]>([]);
  /** A limit that was passed, dashed. */
  readonly limit = input<ChartLimit | null>(null);
  /** The span to show; null for as far as the lines reach. */
  readonly span = input<ChartSpan | null>(null);
  /** The part of the span that is zoomed to; null for all of it. Charts bound to one signal zoom together. */
  readonly zoom = model<ChartSpan | null>(null);

  private readonly page = inject(DOCUMENT).documentElement;
  private readonly theme = inject(ThemeChoice);
  private readonly breadth = signal(640);
  private instance: ECharts | null = null;

  protected readonly isTableShown = signal(false);

  private readonly fullSpan = computed(() => this.span() ?? spanOfLines(this.lines()) ?? { from: 0, to: 1 });
  private readonly shown = computed(() => this.zoom() ?? this.fullSpan());
  private readonly manner = computed(() => {
    this.theme.shown();
    const isStill = matchMedia('(prefers-reduced-motion: reduce)').matches;
    return { colours: readChartColours(this.page), breadth: this.breadth(), isStill };
  });

  protected readonly hasReadings = computed(() =>
    this.lines().some(({ points }) => points.some(([, mean]) => mean !== null)),
  );
  protected readonly isZoomed = computed(() => this.zoom() !== null);
  protected readonly summary = computed(() => chartSummary(this.lines(), this.wanted(), this.zone()));
  protected readonly table = computed(() =>
    this.isTableShown() ? chartTable(this.lines(), this.zone()) : null,
  );

  protected readonly option = computed(() =>
    chartOption(
      {
        lines: this.lines(),
        wanted: this.wanted(),
        lamps: this.lamps(),
        nights: this.nights(),
        marks: this.marks(),
        limit: this.limit(),
        span: this.fullSpan(),
        zone: this.zone(),
      },
      // New readings must not undo a person's zoom, nor a zoom redraw everything.
      untracked(this.shown),
      this.manner(),
    ),
  );
  protected readonly zoomChange = computed(() => zoomOption(this.zone(), this.shown(), this.manner()));

  protected readonly saidMarks = computed(() => {
    const now = this.fullSpan().to;
    return this.marks().map((mark) => ({ ...mark, when: sayWhen(mark.at, now, this.zone()) }));
  });

  constructor() {
    const host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    const watcher = new ResizeObserver(([entry]) => {
      if (entry !== undefined) this.breadth.set(Math.round(entry.contentRect.width));
    });
    afterNextRender(() => watcher.observe(host));
    inject(DestroyRef).onDestroy(() => watcher.disconnect());
    effect(() => {
      this.zoom();
      untracked(() => this.takeOverZoom());
    });
  }

  protected keepInstance(instance: ECharts): void {
    this.instance = instance;
  }

  protected followZoom(): void {
    const zoom = spanShownBy(this.instance?.getOption());
    const { from, to } = this.fullSpan();
    const isWhole = zoom === null || (zoom.from <= from && zoom.to >= to);
    const shown = isWhole ? { from, to } : zoom;
    if (!isSameSpan(shown, this.shown())) this.zoom.set(isWhole ? null : zoom);
  }

  protected zoomBy(factor: number): void {
    this.show(zoomedSpan(this.shown(), this.fullSpan(), factor));
  }

  protected moveBy(share: number): void {
    this.show(movedSpan(this.shown(), this.fullSpan(), share));
  }

  protected showWhole(): void {
    this.show(this.fullSpan());
  }

  protected toggleTable(): void {
    this.isTableShown.update((isShown) => !isShown);
  }

  protected savePicture(): void {
    const picture = this.instance?.getDataURL({
      pixelRatio: 2,
      backgroundColor: this.manner().colours.sheet,
    });
    if (picture !== undefined) saveFile(`${this.title()}.png`, picture);
  }

  protected saveCsv(): void {
    const file = new Blob(['\ufeff', chartCsv(this.lines(), this.zone())], {
      type: 'text/csv;charset=utf-8',
    });
    saveFile(`${this.title()}.csv`, file);
  }

  /** Zooms to where another chart was zoomed. */
  private takeOverZoom(): void {
    const drawn = spanShownBy(this.instance?.getOption());
    if (drawn !== null && !isSameSpan(drawn, this.shown())) this.show(this.shown());
  }

  private show({ from, to }: ChartSpan): void {
    this.instance?.dispatchAction({ type: 'dataZoom', startValue: from, endValue: to });
  }
}
