import { computed, inject, Injectable } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import {
  addSowingTask,
  chooseSowingCrop,
  getDayLength,
  getSowingCalendar,
  setFrostDates,
  unchooseSowingCrop,
  type FrostDates,
  type SowingCalendar,
} from '@shared/contracts/sowing';
import type { Task } from '@shared/contracts/care';
import { changeRoom, getRoom, type Room } from '@shared/contracts/rooms';
import { merge, tap, type Observable } from 'rxjs';
import type * as z from 'zod';
import { ApiClient } from '../core/api-client';
import { failureText } from '../core/failure-text';
import { LiveConnection } from '../core/live-connection';
import { Session } from '../core/session';

/** When to sow what in this room, and the place that it follows from. One for each page. */
@Injectable()
export class SowingData {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);

  private readonly params = computed(() => {
    const roomId = this.session.roomId();
    return roomId === null ? undefined : { roomId };
  });

  readonly resource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getSowingCalendar, { params }),
  });
  /** Null until it is there. */
  readonly calendar = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  /** Why it is not there; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  readonly dayLengthResource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getDayLength, { params, query: {} }),
  });
  /** Day length through the year; null until known. */
  readonly dayLength = computed(() =>
    this.dayLengthResource.hasValue() ? this.dayLengthResource.value() : null,
  );

  readonly roomResource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getRoom, { params }),
  });
  /** The room with its place; null until known. */
  readonly room = computed(() => (this.roomResource.hasValue() ? this.roomResource.value() : null));

  readonly mayPlan = computed(() => this.session.may('grower'));
  readonly mayChangePlace = computed(() => this.session.may('keeper'));

  constructor() {
    const live = inject(LiveConnection);
    merge(live.on('room:changed'), live.on('task:changed'), live.caughtUp)
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.resource.reload());
  }

  /** Puts a crop on the calendar, or changes how its sowings follow each other; null for one sowing. */
  choose(cropId: string, everyDays: number | null): Observable<SowingCalendar> {
    const params = { ...this.place(), cropId };
    return this.showing(this.api.call(chooseSowingCrop, { params, body: { everyDays } }));
  }

  /** Takes a crop off the calendar. */
  unchoose(cropId: string): Observable<SowingCalendar> {
    return this.showing(this.api.call(unchooseSowingCrop, { params: { ...this.place(), cropId } }));
  }

  /** Makes a care task of a sowing day; an open one for the crop is kept. */
  addTask(cropId: string, on: string): Observable<Task> {
    return this.api
      .call(addSowingTask, { params: { ...this.place(), cropId }, body: { on } })
      .pipe(tap(() => this.resource.reload()));
  }

  /** Sets the frost dates; every window follows. */
  setFrost(body: z.input<typeof setFrostDates.body>): Observable<FrostDates> {
    return this.api
      .call(setFrostDates, { params: this.place(), body })
      .pipe(tap(() => this.resource.reload()));
  }

  /** Says where the room is; day length and onions follow. */
  setPlace(body: { latitudeDeg: number; longitudeDeg: number | null }): Observable<Room> {
    return this.api.call(changeRoom, { params: this.place(), body }).pipe(
      tap((room) => {
        this.roomResource.set(room);
        this.resource.reload();
        this.dayLengthResource.reload();
      }),
    );
  }

  private place(): { roomId: string } {
    return { roomId: this.session.roomId() ?? '' };
  }

  private showing(call: Observable<SowingCalendar>): Observable<SowingCalendar> {
    return call.pipe(tap((calendar) => this.resource.set(calendar)));
  }
}
