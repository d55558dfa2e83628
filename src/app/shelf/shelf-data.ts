import { computed, inject, Injectable, linkedSignal, signal, untracked } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import type { ShelfAdviceView } from '@shared/contracts/advice';
import { listAlerts } from '@shared/contracts/alerts';
import { getBoard, type Board, type Measure, type ShelfNow } from '@shared/contracts/board';
import type { Quantity } from '@shared/climate/quantity';
import { getShelf, getShelfReport } from '@shared/contracts/series';
import { filter, interval, map, merge, tap } from 'rxjs';
import { ApiClient } from '../core/api-client';
import { LiveConnection } from '../core/live-connection';
import { RoomClock } from '../core/room-clock';
import { Session } from '../core/session';
import { keptValue } from './kept-value';
import { boundsOf, reachesNow, type SpanChoice } from './span/shelf-span';

const refreshMs = 5 * 60_000;
const mostAlerts = 200;
/** A device's clock that is further off than this asked for the wrong span. */
const clockToleranceMs = 60_000;

/** What a shelf's page shows: the shelf, the span that is looked at, and its newest values. One for each page. */
@Injectable()
export class ShelfData {
  private readonly api = inject(ApiClient);
  private readonly clock = inject(RoomClock);
  private readonly session = inject(Session);

  /** Which shelf; null until the address is known. */
  readonly shelfId = signal<string | null>(null);
  /** Which span. */
  readonly choice = signal<SpanChoice>({ kind: 'week' });

  /** When the span was looked at [ms]; it ends there, however long the page stays open. */
  private readonly asOf = linkedSignal({
    source: this.choice,
    computation: () => untracked(this.clock.now),
  });
  private readonly newest = signal<ShelfNow | null>(null);
  private readonly newestAdvice = signal<ShelfAdviceView | null>(null);

  /** The span's instants. */
  readonly span = computed(() => boundsOf(this.choice(), this.asOf(), this.session.timeZone()));
  /** Whether new readings belong to the span. */
  readonly isLive = computed(() => reachesNow(this.choice(), this.asOf(), this.session.timeZone()));
  /** Parameters of every call about the shelf; undefined until it is known which. */
  readonly params = computed(
    () => {
      const [roomId, shelfId] = [this.session.roomId(), this.shelfId()];
      return roomId === null || shelfId === null ? undefined : { roomId, shelfId };
    },
    { equal: (a, b) => a?.roomId === b?.roomId && a?.shelfId === b?.shelfId },
  );
  /** The same with the span as its instants are sent. */
  readonly query = computed(() => {
    const { from, to } = this.span();
    return { from: new Date(from).toISOString(), to: new Date(to).toISOString() };
  });

  /** The shelf with what it carries and wants. */
  readonly detailResource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getShelf, { params }),
  });
  readonly detail = keptValue(this.detailResource, this.params);

  /** Table, light, lamp hours and events of the span. */
  readonly reportResource = rxResource({
    params: () => this.withQuery(),
    stream: ({ params: { query, ...params } }) => this.api.call(getShelfReport, { params, query }),
  });
  readonly report = keptValue(this.reportResource, this.subject());

  private readonly board = rxResource({
    params: this.params,
    stream: ({ params: { roomId } }) =>
      this.api.call(getBoard, { params: { roomId } }).pipe(tap((board) => this.takeOver(board))),
  });

  private readonly alertResource = rxResource({
    params: this.params,
    stream: ({ params: { roomId, shelfId } }) =>
      this.api
        .call(listAlerts, { params: { roomId }, query: { shelfId, limit: mostAlerts } })
        .pipe(map(({ alerts }) => alerts)),
  });
  /** The shelf's newest alerts. */
  readonly alerts = computed(() => (this.alertResource.hasValue() ? this.alertResource.value() : []));
  /** Those of them that are not over. */
  readonly openAlerts = computed(() => this.alerts().filter(({ clearedAt }) => clearedAt === null));

  /** The shelf's newest values; null until known. */
  readonly now = computed(() => {
    const newest = this.newest();
    return newest?.shelfId === this.shelfId() ? newest : null;
  });
  /** What the shelf should be for what grows on it; null until worked out. */
  readonly advice = computed(() => {
    const advice = this.newestAdvice();
    return advice?.shelfId === this.shelfId() ? advice : null;
  });
  /** Care that is due on the shelf by now and not done. */
  readonly openTasks = computed(() => {
    if (!this.board.hasValue()) return [];
    const { tasks, today } = this.board.value();
    return tasks.filter(
      ({ shelfId, doneAt, dueOn }) => shelfId === this.shelfId() && doneAt === null && dueOn <= today,
    );
  });
  /** The day of the room's calendar, `YYYY-MM-DD`; null until known. */
  readonly today = computed(() => (this.board.hasValue() ? this.board.value().today : null));

  constructor() {
    const live = inject(LiveConnection);
    live
      .on('shelf:measured')
      .pipe(
        filter(({ shelfId }) => shelfId === this.shelfId()),
        takeUntilDestroyed(),
      )
      .subscribe((now) => this.newest.set(now));
    live
      .on('shelf:advised')
      .pipe(
        filter(({ shelfId }) => shelfId === this.shelfId()),
        takeUntilDestroyed(),
      )
      .subscribe((advice) => this.newestAdvice.set(advice));
    live
      .on('task:changed')
      .pipe(
        filter(({ shelfId }) => shelfId === this.shelfId()),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.refreshBoard());
    live
      .on('alert:changed')
      .pipe(
        filter(({ shelfId }) => shelfId === this.shelfId()),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.alertResource.reload());
    merge(live.caughtUp, interval(refreshMs))
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.refresh());
    live
      .on('room:changed')
      .pipe(takeUntilDestroyed())
      .subscribe(() => {
        this.detailResource.reload();
        this.refreshBoard();
      });
  }

  /** The newest value of a quantity; null without any. */
  measure(quantity: Quantity): Measure | null {
    return this.now()?.measures.find((measure) => measure.quantity === quantity) ?? null;
  }

  /** What must be the same for charts and tables to be kept while they are fetched anew. */
  subject(): () => unknown {
    return computed(() => `${this.params()?.shelfId} ${JSON.stringify(this.choice())}`);
  }

  /** Fetches newest values, advice and care again. */
  refreshBoard(): void {
    this.board.reload();
  }

  /** Fetches what may have changed unseen, up to this moment. */
  refresh(): void {
    this.detailResource.reload();
    this.refreshBoard();
    this.alertResource.reload();
    if (this.isLive()) this.asOf.set(this.clock.now());
    else this.reportResource.reload();
  }

  private takeOver({ at, racks }: Board): void {
    const before = this.clock.now();
    this.clock.setBy(at);
    const isClockWrong = Math.abs(this.clock.now() - before) > clockToleranceMs;
    if (isClockWrong && this.isLive()) this.asOf.set(this.clock.now());
    const shelves = racks.flatMap(({ shelves: onRack }) => onRack);
    const shelf = shelves.find(({ id }) => id === this.shelfId());
    this.newest.set(shelf?.now ?? null);
    this.newestAdvice.set(shelf?.advice ?? null);
  }

  private withQuery() {
    const params = this.params();
    return params === undefined ? undefined : { ...params, query: this.query() };
  }
}
