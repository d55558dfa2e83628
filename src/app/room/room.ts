import { ChangeDetectionStrategy, Component, computed, inject, Injector, signal } from '@angular/core';
import type { Alert } from '@shared/contracts/alerts';
import type { Task } from '@shared/contracts/care';
import { catchError, finalize, from, switchMap, throwError, type Observable } from 'rxjs';
import { ApiFailure } from '../core/api-failure';
import { CareDesk } from '../core/care/care-desk';
import { CareQueue } from '../core/care/care-queue';
import { failureText } from '../core/failure-text';
import { Notices } from '../core/notices';
import type { PlanQuestion } from '../core/plan-change';
import { ReaderFormat } from '../core/reader-format';
import { Session } from '../core/session';
import { NoteLine } from '../ui/note-line/note-line';
import { EmptyState } from '../ui/states/empty-state';
import { ErrorState } from '../ui/states/error-state';
import { RoomBoard } from './board/room-board';
import { NeedsALook } from './needs-a-look/needs-a-look';
import { RoomHeading } from './room-heading/room-heading';
import { RoomSkeleton } from './room-skeleton/room-skeleton';
import { ScenarioPanel } from './scenario-panel/scenario-panel';
import { ShelfBay } from './shelf-bay/shelf-bay';
import { TodaysCare } from './todays-care/todays-care';

/** The room as it stands: its racks, what needs a look, and today's care. */
@Component({
  selector: 'app-room',
  templateUrl: './room.html',
  styleUrl: './room.scss',
  imports: [
    EmptyState,
    ErrorState,
    NeedsALook,
    NoteLine,
    RoomHeading,
    RoomSkeleton,
    ScenarioPanel,
    ShelfBay,
    TodaysCare,
  ],
  providers: [RoomBoard],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Room {
  private readonly room = inject(RoomBoard);
  private readonly session = inject(Session);
  private readonly notices = inject(Notices);
  private readonly format = inject(ReaderFormat);
  private readonly injector = inject(Injector);
  private readonly queue = inject(CareQueue);
  private readonly desk = inject(CareDesk);

  protected readonly board = this.room.board;
  protected readonly alertsByShelf = this.room.alertsByShelf;
  protected readonly needsByShelf = this.room.needsByShelf;
  protected readonly needs = computed(() => [...this.needsByShelf().values()].flat());
  protected readonly hasRoom = computed(() => this.session.room() !== null);
  protected readonly isHelper = computed(() => this.session.may('helper'));
  protected readonly isKeeper = computed(() => this.session.may('keeper'));
  /** The same list every time, so that a quiet shelf is not drawn anew. */
  protected readonly none: readonly never[] = [];
  /** Today's care with what waits to be sent. */
  protected readonly tasks = computed(() => this.queue.shown(this.board()?.tasks ?? []));
  protected readonly isHeldUp = this.queue.isHeldUp;
  /** Alerts that are being changed. */
  protected readonly busyIds = signal<ReadonlySet<string>>(new Set());

  protected readonly problem = computed(() => {
    const failure = this.room.failure();
    return failure === null ? null : failureText(failure);
  });

  protected readonly day = computed(() => {
    const board = this.board();
    if (board === null) return null;
    return { today: board.today, startAt: Date.parse(board.dayStart), endAt: Date.parse(board.dayEnd) };
  });

  protected readonly shelves = computed(() => this.board()?.racks.flatMap((rack) => rack.shelves) ?? []);
  protected readonly shelfLabels = computed(() => this.shelves().map(({ label }) => label));

  /** What is read out: an alert that has just opened, or that has just cleared. */
  protected readonly news = computed(() => {
    const alert = this.room.news();
    if (alert === null) return '';
    const { title } = this.format.describe(alert);
    return alert.clearedAt === null ? `Needs a look: ${title}.` : `Over: ${title}.`;
  });

  protected refresh(): void {
    this.room.refresh();
  }

  protected acknowledge(alert: Alert): void {
    this.carryOut(alert.id, this.room.acknowledge(alert)).subscribe({
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }

  protected tick(task: Task): void {
    if (task.outcome === null)
      void this.desk.close(task, { outcome: 'done' }, (question) => this.ask(question));
    else void this.desk.takeBack(task);
  }

  protected noteObservation(): void {
    const roomId = this.session.roomId();
    if (roomId === null) return;
    fetched(import('./observation-dialog/open-observation'))
      .pipe(
        switchMap(({ openObservation }) =>
          openObservation(this.injector, { roomId, shelves: this.shelves() }),
        ),
      )
      .subscribe({
        next: (event) => {
          if (event !== undefined) this.notices.say('Noted');
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  /** Dialogs are fetched once they are wanted: the room opens sooner without them. */
  private ask(question: PlanQuestion): Observable<boolean> {
    return fetched(import('../ui/dialogs/asking')).pipe(
      switchMap(({ Asking }) => this.injector.get(Asking).ask(question)),
    );
  }

  private carryOut<T>(id: string, deed: Observable<T>): Observable<T> {
    this.busyIds.update((ids) => new Set([...ids, id]));
    return deed.pipe(
      finalize(() => this.busyIds.update((ids) => new Set([...ids].filter((busy) => busy !== id)))),
    );
  }
}

function fetched<T>(module: Promise<T>): Observable<T> {
  return from(module).pipe(
    catchError((cause: unknown) => throwError(() => new ApiFailure('offline', { cause }))),
  );
}
