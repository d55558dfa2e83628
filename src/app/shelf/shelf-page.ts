import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import type { Quantity } from '@shared/climate/quantity';
import { dayBounds } from '@shared/series/room-days';
import { failureText } from '../core/failure-text';
import { ReaderFormat } from '../core/reader-format';
import { Session } from '../core/session';
import type { ChartSpan } from '../ui/chart/chart-data';
import { LampBar } from '../ui/lamp-bar/lamp-bar';
import { alertLook } from '../ui/note-line/alert-look';
import { NoteLine } from '../ui/note-line/note-line';
import { PlantLabel } from '../ui/plant-label/plant-label';
import { plantingWords } from '../core/planting-words';
import { EmptyState } from '../ui/states/empty-state';
import { ErrorState } from '../ui/states/error-state';
import { LoadingLines } from '../ui/states/loading-lines';
import { ShelfAdviceCard } from './advice/shelf-advice-card';
import { ShelfChart } from './charts/shelf-chart';
import { ShelfNotes } from './notes/shelf-notes';
import { chartedQuantities } from './quantity-title';
import { ShelfLight } from './report/shelf-light';
import { ShelfWarmth } from './report/shelf-warmth';
import { SpanTable } from './report/span-table';
import { ShelfData } from './shelf-data';
import { shelfFacts } from './shelf-facts';
import {
  choiceOf,
  queryOf,
  spanWords,
  weekEndingAt,
  weekStartingAt,
  type SpanChoice,
} from './span/shelf-span';
import { SpanPicker } from './span/span-picker';
import { ShelfWants } from './wants/shelf-wants';

const usualBaseC = 10;

/** A shelf's history: its charts over a span, what it should be, and what was done there. */
@Component({
  selector: 'app-shelf-page',
  templateUrl: './shelf-page.html',
  styleUrl: './shelf-page.scss',
  imports: [
    EmptyState,
    ErrorState,
    LampBar,
    LoadingLines,
    MatButton,
    NoteLine,
    PlantLabel,
    RouterLink,
    ShelfAdviceCard,
    ShelfChart,
    ShelfLight,
    ShelfNotes,
    ShelfWants,
    ShelfWarmth,
    SpanPicker,
    SpanTable,
  ],
  providers: [ShelfData],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShelfPage {
  /** From the path. */
  readonly shelfId = input.required<string>();
  /** From the address: a span that ends now, or days from and to. */
  readonly span = input<string>();
  readonly from = input<string>();
  readonly to = input<string>();
  /** From the address: where warmth begins to count [°C]. */
  readonly base = input<string>();

  protected readonly data = inject(ShelfData);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  private readonly format = inject(ReaderFormat);

  protected readonly choice = computed(() =>
    choiceOf({ span: this.span(), from: this.from(), to: this.to() }),
  );
  protected readonly baseC = computed(() => {
    const base = Number(this.base() ?? usualBaseC);
    return base >= -10 && base <= 40 ? base : usualBaseC;
  });
  protected readonly zoom = signal<ChartSpan | null>(null);

  protected readonly failure = computed(() => {
    const error = this.data.detailResource.error();
    return error === undefined ? null : failureText(error);
  });
  protected readonly facts = computed(() => {
    const detail = this.data.detail();
    return detail === null ? '' : shelfFacts(detail);
  });
  protected readonly labels = computed(() => {
    const today = this.data.today();
    return (this.data.detail()?.plantings ?? []).map((planting) => ({
      ...planting,
      note: today === null ? null : plantingWords(planting, today),
    }));
  });
  protected readonly lit = computed(() => this.data.now()?.lampDay.lit ?? null);
  protected readonly hasLamp = computed(() => (this.data.detail()?.shelf.lamps.length ?? 0) > 0);
  protected readonly quantities = computed(() =>
    chartedQuantities.filter((quantity) => this.data.detail()?.quantities.includes(quantity) === true),
  );
  protected readonly hasLight = computed(() =>
    this.quantities().some((quantity) => quantity === 'ppfd' || quantity === 'illuminance'),
  );
  protected readonly hasWarmth = computed(() =>
    this.quantities().some((quantity) => quantity.endsWith('Temperature')),
  );
  protected readonly firstDay = computed(() => {
    const firstAt = this.data.detail()?.firstAt ?? null;
    return firstAt === null ? null : dayBounds(Date.parse(firstAt), this.session.timeZone()).date;
  });
  protected readonly alerts = computed(() =>
    this.data.openAlerts().map((alert) => {
      const { sentence, tryThis } = this.format.describe(alert, this.data.now()?.lampDay);
      return { id: alert.id, ...alertLook(alert.kind), text: `${sentence} ${tryThis}` };
    }),
  );

  /** Which charts have readings in the span, as far as they have said so. */
  private readonly found = signal<ReadonlyMap<Quantity, boolean>>(new Map());
  protected readonly isEmpty = computed(
    () =>
      this.quantities().length > 0 &&
      this.quantities().every((quantity) => this.found().get(quantity) === false),
  );
  /** The nearest span with readings; null when none is known. */
  protected readonly nearest = computed(() => {
    const firstAt = this.data.detail()?.firstAt ?? null;
    if (firstAt === null) return null;
    const zone = this.session.timeZone();
    const isBeforeAll = Date.parse(firstAt) >= this.data.span().to;
    if (isBeforeAll) return this.offer(weekStartingAt(Date.parse(firstAt), zone));
    const lastAt = Math.max(...(this.data.now()?.measures ?? []).map(({ at }) => Date.parse(at)));
    return Number.isFinite(lastAt) ? this.offer(weekEndingAt(lastAt, zone)) : null;
  });

  constructor() {
    effect(() => this.data.shelfId.set(this.shelfId()));
    effect(() => {
      this.data.choice.set(this.choice());
      this.zoom.set(null);
    });
  }

  protected noteFound(quantity: Quantity, isFound: boolean): void {
    this.found.update((found) => new Map(found).set(quantity, isFound));
  }

  protected show(choice: SpanChoice): void {
    this.changeAddress({ ...queryOf(choice) });
  }

  protected showAbove(baseC: number): void {
    this.changeAddress({ base: baseC === usualBaseC ? null : String(baseC) });
  }

  private offer(choice: SpanChoice): { choice: SpanChoice; words: string } {
    return { choice, words: spanWords(choice) };
  }

  private changeAddress(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge' });
  }
}
