import { computed, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { getCareDays, type CareDays, type Task } from '@shared/contracts/care';
import { dayBounds } from '@shared/series/room-days';
import { catchError, EMPTY, filter, merge, Subject, switchMap, tap, type Observable } from 'rxjs';
import { ApiClient } from '../api-client';
import { LiveConnection } from '../live-connection';
import { RoomClock } from '../room-clock';
import { Session } from '../session';
import { CareQueue } from './care-queue';
import { KeptOnPhone } from './kept-on-phone';
import type { ShownTask } from './with-waiting';

/**
 * Today's and tomorrow's care of the room, as the server last told it and with what the person did since. Kept on the
 * phone, from where it comes while there is no signal.
 */
@Injectable({ providedIn: 'root' })
export class CareToday {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly clock = inject(RoomClock);
  private readonly kept = inject(KeptOnPhone);
  private readonly queue = inject(CareQueue);
  private readonly held = signal<CareDays | null>(null);
  private readonly failed = signal<unknown>(null);
  private readonly wanted = new Subject<void>();
  /** Told while a fetch was under way, whose answer may be older; null while none is. */
  private untilFetched: Task[] | null = null;

  /** As it was last told; null until then. */
  readonly days = this.held.asReadonly();
  /** Why the last fetch failed; null when it didn't. Older days may stand all the same. */
  readonly failure = this.failed.asReadonly();

  /** The room's day now: days from yesterday's phone have another today by now. */
  readonly today = computed(() => {
    const days = this.held();
    return days && dayBounds(this.clock.calmNow(), days.timeZone).date;
  });

  /** Every task of these days with what waits laid over it. */
  readonly tasks = computed<readonly ShownTask[]>(() => this.queue.shown(this.held()?.tasks ?? []));

  constructor() {
    const live = inject(LiveConnection);
    this.wanted
      .pipe(
        switchMap(() => this.fetch()),
        takeUntilDestroyed(),
      )
      .subscribe();
    const isYesterday = computed(() => this.today() !== (this.held()?.today ?? null));
    const dayTurned = toObservable(isYesterday).pipe(filter(Boolean));
    merge(toObservable(this.session.roomId), live.caughtUp, live.on('room:changed'), dayTurned)
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.refresh());
    merge(live.on('task:changed'), this.queue.taken)
      .pipe(takeUntilDestroyed())
      .subscribe((task) => this.takeOver(task));
  }

  /** Fetches the days again. */
  refresh(): void {
    this.wanted.next();
  }

  /** Takes over a task as the server has it now. */
  takeOver(task: Task): void {
    this.untilFetched?.push(task);
    const days = this.held();
    if (days !== null) this.hold(withTask(days, task));
  }

  private fetch(): Observable<CareDays> {
    const roomId = this.session.roomId();
    if (roomId === null) return EMPTY;
    this.untilFetched = [];
    if (this.held()?.roomId !== roomId) {
      this.held.set(null);
      void this.takeFromPhone(roomId);
    }
    return this.api.call(getCareDays, { params: { roomId } }).pipe(
      tap((days) => {
        this.clock.setBy(days.at);
        this.failed.set(null);
        const told = this.untilFetched ?? [];
        this.untilFetched = null;
        this.hold(told.reduce(withTask, days));
      }),
      catchError((error: unknown) => {
        this.failed.set(error);
        this.untilFetched = null;
        return EMPTY;
      }),
    );
  }

  /** Shows what the phone has until the server answers. */
  private async takeFromPhone(roomId: string): Promise<void> {
    const personId = this.session.account()?.id;
    if (personId === undefined) return;
    const days = await this.kept.daysOf(personId, roomId);
    if (this.held() === null && this.session.roomId() === roomId) this.held.set(days);
  }

  private hold(days: CareDays): void {
    this.held.set(days);
    const personId = this.session.account()?.id;
    if (personId !== undefined) void this.kept.keepDays(personId, days);
  }
}

/** Days with a task as it is now; one that is due later has no place in them. */
export function withTask(days: CareDays, task: Task): CareDays {
  const isKnown = days.tasks.some(({ id }) => id === task.id);
  if (task.dueOn > days.tomorrow) return { ...days, tasks: days.tasks.filter(({ id }) => id !== task.id) };
  const tasks = isKnown
    ? days.tasks.map((known) => (known.id === task.id ? task : known))
    : [...days.tasks, task];
  return { ...days, tasks };
}
