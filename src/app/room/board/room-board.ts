import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { acknowledgeAlert } from '@shared/contracts/alert-answers';
import type { Alert } from '@shared/contracts/alerts';
import { getBoard, type Board } from '@shared/contracts/board';
import { catchError, EMPTY, filter, merge, Subject, switchMap, tap, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { CareQueue } from '../../core/care/care-queue';
import { LiveConnection } from '../../core/live-connection';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { alertChanged, shelfAdvised, shelfMeasured, taskChanged, type BoardChange } from './board-changes';
import { shelfNeeds, type ShelfNeed } from './shelf-needs';

/** The room as it is now, kept so by what the server tells. One for each time the Room screen is open. */
@Injectable()
export class RoomBoard {
  private readonly api = inject(ApiClient);
  private readonly live = inject(LiveConnection);
  private readonly queue = inject(CareQueue);
  private readonly session = inject(Session);
  private readonly clock = inject(RoomClock);
  private readonly held = signal<Board | null>(null);
  private readonly failed = signal<unknown>(null);
  private readonly wanted = new Subject<string>();
  /** What was told while a fetch was under way, whose answer may be older; null while none is. */
  private untilFetched: BoardChange[] | null = null;

  /** The room; null until it has been fetched for the first time. */
  readonly board = this.held.asReadonly();
  /** Why the last fetch failed; null when it didn't. An older board may stand all the same. */
  readonly failure = this.failed.asReadonly();
  /** An alert that has just opened or cleared, for reading out; null before the first. */
  readonly news = signal<Alert | null>(null);

  /** Open alerts by shelf. */
  readonly alertsByShelf = computed<ReadonlyMap<string, readonly Alert[]>>(() => {
    const byShelf = new Map<string, Alert[]>();
    for (const alert of this.held()?.openAlerts ?? []) {
      byShelf.set(alert.shelfId, [...(byShelf.get(alert.shelfId) ?? []), alert]);
    }
    return byShelf;
  });

  /** What shelves need for what grows on them, by shelf; a shelf that needs nothing is not in it. */
  readonly needsByShelf = computed<ReadonlyMap<string, readonly ShelfNeed[]>>(() => {
    const shelves = this.held()?.racks.flatMap((rack) => rack.shelves) ?? [];
    return new Map(
      shelves.map((shelf) => [shelf.id, shelfNeeds(shelf)] as const).filter(([, needs]) => needs.length > 0),
    );
  });

  constructor() {
    this.wanted
      .pipe(
        switchMap((roomId) => this.fetch(roomId)),
        takeUntilDestroyed(),
      )
      .subscribe();
    merge(toObservable(this.session.roomId), this.live.caughtUp, this.live.on('room:changed'))
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.refresh());
    this.follow();
    this.turnPages();
  }

  /** Fetches the room again. */
  refresh(): void {
    const roomId = this.session.roomId();
    if (roomId !== null) this.wanted.next(roomId);
  }

  /** Says that somebody has seen an alert. */
  acknowledge(alert: Alert): Observable<Alert> {
    return this.api
      .call(acknowledgeAlert, { params: { ...this.room(), alertId: alert.id }, body: {} })
      .pipe(tap((seen) => this.apply(alertChanged(seen))));
  }

  private room(): { roomId: string } {
    return { roomId: this.session.roomId() ?? '' };
  }

  private fetch(roomId: string): Observable<Board> {
    this.untilFetched = [];
    if (this.held()?.roomId !== roomId) this.held.set(null);
    return this.api.call(getBoard, { params: { roomId } }).pipe(
      tap((board) => {
        this.clock.setBy(board.at);
        this.failed.set(null);
        this.held.set((this.untilFetched ?? []).reduce((known, change) => change(known), board));
        this.untilFetched = null;
      }),
      catchError((error: unknown) => {
        this.failed.set(error);
        this.untilFetched = null;
        return EMPTY;
      }),
    );
  }

  private follow(): void {
    merge(
      this.live.on('shelf:measured').pipe(tap((now) => this.apply(shelfMeasured(now)))),
      this.live.on('shelf:advised').pipe(tap((advice) => this.apply(shelfAdvised(advice)))),
      merge(this.live.on('task:changed'), this.queue.taken).pipe(
        tap((task) => this.apply(taskChanged(task))),
      ),
      this.live.on('alert:changed').pipe(tap((alert) => this.takeAlert(alert))),
    )
      .pipe(takeUntilDestroyed(inject(DestroyRef)))
      .subscribe();
  }

  private takeAlert(alert: Alert): void {
    const isKnown = this.held()?.openAlerts.some(({ id }) => id === alert.id) ?? false;
    // Only changes of state are read out: not a new peak, not an acknowledgement.
    if (isKnown !== (alert.clearedAt === null)) this.news.set(alert);
    this.apply(alertChanged(alert));
  }

  private apply(change: BoardChange): void {
    this.untilFetched?.push(change);
    this.held.update((board) => board && change(board));
  }

  /** At the room's midnight another day begins, with its own lamp hours and care. */
  private turnPages(): void {
    const isYesterday = computed(() => {
      const board = this.held();
      return board !== null && this.clock.now() >= Date.parse(board.dayEnd);
    });
    toObservable(isYesterday)
      .pipe(filter(Boolean), takeUntilDestroyed())
      .subscribe(() => this.refresh());
  }
}
