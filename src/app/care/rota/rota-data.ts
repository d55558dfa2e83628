import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { weekdayOf } from '@shared/care/rota';
import { listTasks } from '@shared/contracts/care';
import { getFairShare, getRota, listSwaps } from '@shared/contracts/care-rota';
import { dayAfter } from '@shared/growing/calendar-day';
import { auditTime, merge } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { LiveConnection } from '../../core/live-connection';
import { ReaderFormat } from '../../core/reader-format';
import { RoomMembers } from '../../core/room-members';
import { Session } from '../../core/session';
import { rotaWeek } from './week/rota-week';

/** A change of the rota moves many tasks at once; they are fetched again once it is over. */
const followAfterMs = 600;
/** The share is told over the shown week and so many days before it. */
const shareBeforeDays = 21;

/** A week of the rota: who is there, what is due, what is on offer and how it is shared. One for each page. */
@Injectable()
export class RotaData {
  private readonly api = inject(ApiClient);
  private readonly members = inject(RoomMembers);
  private readonly session = inject(Session);
  private readonly format = inject(ReaderFormat);

  /** Any day of the week to show; null for this week. */
  readonly chosenDay = signal<string | null>(null);
  readonly today = this.format.today;
  /** Its Monday. */
  readonly monday = computed(() => {
    const day = this.chosenDay() ?? this.today();
    return dayAfter(day, 1 - weekdayOf(day));
  });
  readonly span = computed(() => ({ from: this.monday(), to: dayAfter(this.monday(), 7) }));
  readonly shareSpan = computed(() => ({
    from: dayAfter(this.monday(), -shareBeforeDays),
    to: this.span().to,
  }));

  private readonly params = computed(() => {
    const roomId = this.session.roomId();
    return roomId === null ? undefined : { roomId };
  });
  private readonly ofWeek = computed(() => {
    const params = this.params();
    return params && { params, query: this.span() };
  });
  readonly rotaResource = rxResource({
    params: this.ofWeek,
    stream: ({ params }) => this.api.call(getRota, params),
  });
  readonly tasksResource = rxResource({
    params: this.ofWeek,
    stream: ({ params }) => this.api.call(listTasks, params),
  });
  readonly swapsResource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(listSwaps, { params }),
  });
  readonly shareResource = rxResource({
    params: () => {
      const params = this.params();
      return params && { params, query: this.shareSpan() };
    },
    stream: ({ params }) => this.api.call(getFairShare, params),
  });

  /** Null until it is there. */
  readonly rota = computed(() => (this.rotaResource.hasValue() ? this.rotaResource.value() : null));
  /** Members who may do care; nobody until known. */
  readonly people = computed(() =>
    (this.members.caring() ?? []).map(({ personId, name }) => ({ personId, name })),
  );
  /** Null until it is all there. */
  readonly rows = computed(() => {
    const [rota, people] = [this.rota(), this.members.caring()];
    if (rota === null || people === null || !this.tasksResource.hasValue()) return null;
    return rotaWeek(rota.days, this.tasksResource.value(), this.people(), this.today());
  });
  /** Why the week is not there; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.rotaResource.error() ?? this.tasksResource.error();
    return error === undefined ? this.members.failure() : failureText(error);
  });

  constructor() {
    this.members.want();
    const live = inject(LiveConnection);
    const changed = live.on('task:changed');
    changed
      .pipe(takeUntilDestroyed())
      .subscribe((task) =>
        this.tasksResource.update((tasks) => tasks?.map((one) => (one.id === task.id ? task : one))),
      );
    merge(changed, live.on('room:changed'), live.caughtUp)
      .pipe(auditTime(followAfterMs), takeUntilDestroyed())
      .subscribe(() => this.refresh());
  }

  /** Fetches everything anew; what is shown stays until it is there. */
  refresh(): void {
    this.members.want();
    for (const resource of [this.rotaResource, this.tasksResource, this.swapsResource, this.shareResource]) {
      resource.reload();
    }
  }
}
