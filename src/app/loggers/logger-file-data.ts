import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { listDevices, placeSensorEarlier, type Device } from '@shared/contracts/devices';
import { getBoard } from '@shared/contracts/board';
import type { MeasuredQuantity } from '@shared/climate/quantity';
import {
  bringInLoggerFile,
  cancelLoggerFile,
  checkLoggerFile,
  getLoggerFile,
  matchLoggerFile,
  takeOutLoggerFile,
  type DifferingChoice,
  type LoggerFile,
} from '@shared/contracts/logger-files';
import {
  catchError,
  concat,
  concatMap,
  EMPTY,
  filter,
  finalize,
  forkJoin,
  interval,
  last,
  map,
  merge,
  Subject,
  switchMap,
  tap,
  type Observable,
} from 'rxjs';
import type * as z from 'zod';
import { ApiClient } from '../core/api-client';
import { failureText } from '../core/failure-text';
import { LiveConnection } from '../core/live-connection';
import { RoomClock } from '../core/room-clock';
import { Session } from '../core/session';
import { isAtWork, sensorWords } from './file-words';

/** What is sent to match a file's columns. */
export type Matches = z.input<typeof matchLoggerFile.body>;

/** A sensor that a column's readings may be of. */
export interface SensorChoice {
  readonly id: string;
  readonly quantity: MeasuredQuantity;
  readonly shelfId: string | null;
  readonly shelfLabel: string | null;
  /** "A3 root zone" */
  readonly words: string;
  readonly deviceName: string;
}

/** A shelf of the room. */
export interface ShelfChoice {
  readonly id: string;
  readonly label: string;
}

interface Places {
  readonly sensors: readonly SensorChoice[];
  readonly shelves: readonly ShelfChoice[];
}

const pollMs = 5_000;

/** One logger file on its way in, kept current by what the server tells. One for each page. */
@Injectable()
export class LoggerFileData {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly clock = inject(RoomClock);
  private readonly matching = new Subject<Matches>();
  private readonly work = signal(0);

  /** Which file; null until the address is known. */
  readonly fileId = signal<string | null>(null);
  /** What went wrong with the last thing the person did; null when nothing. */
  readonly problem = signal<string | null>(null);
  /** Whether an answer is awaited. */
  readonly isBusy = computed(() => this.work() > 0);

  private readonly params = computed(() => {
    const [roomId, fileId] = [this.session.roomId(), this.fileId()];
    return roomId === null || fileId === null ? undefined : { roomId, fileId };
  });

  /** The file with its columns and preview. */
  readonly resource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getLoggerFile, { params }),
  });
  readonly file = computed(() => (this.resource.hasValue() ? this.resource.value() : null));

  private readonly placeResource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) => this.fetchPlaces(params),
  });
  private readonly places = computed(() =>
    this.placeResource.hasValue() ? this.placeResource.value() : { sensors: [], shelves: [] },
  );
  /** Every sensor of the room, by shelf. */
  readonly sensors = computed(() => this.places().sensors);
  /** Every shelf of the room. */
  readonly shelves = computed(() => this.places().shelves);

  constructor() {
    const live = inject(LiveConnection);
    live
      .on('loggerFile:changed')
      .pipe(
        filter(({ id }) => id === this.fileId()),
        takeUntilDestroyed(),
      )
      .subscribe((file) => this.takeOver(file));
    // Progress comes live; where it doesn't, as behind some proxies, the file is asked for now and then.
    const polls = interval(pollMs).pipe(filter(() => this.isFileAtWork()));
    merge(live.caughtUp, polls)
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.resource.reload());
    // One after the other: an older answer must not overtake a newer choice.
    this.matching
      .pipe(
        concatMap((matches) => this.sendMatches(matches)),
        takeUntilDestroyed(),
      )
      .subscribe();
  }

  /** Says what the columns are; the answer shows the preview read anew. */
  match(matches: Matches): void {
    this.matching.next(matches);
  }

  /** Has the whole file read without storing anything. */
  check(): void {
    const params = this.params();
    if (params !== undefined) this.run(this.api.call(checkLoggerFile, { params }));
  }

  /** Has the file's readings stored. */
  bringIn(differing: DifferingChoice): void {
    const params = this.params();
    if (params !== undefined) this.run(this.api.call(bringInLoggerFile, { params, body: { differing } }));
  }

  /** Says since when sensors were on their first shelves, and has the file read again. */
  placeEarlier(first: readonly { readonly sensorId: string; readonly since: string }[]): void {
    const params = this.params();
    if (params === undefined) return;
    const placed = first.map(({ sensorId, since }) =>
      this.api.call(placeSensorEarlier, { params: { ...params, sensorId }, body: { since } }),
    );
    const checked = switchMap(() => this.api.call(checkLoggerFile, { params }));
    this.run(concat(...placed).pipe(last(), checked));
  }

  /** Stops what the server does with the file; nothing is stored. */
  cancel(): void {
    const params = this.params();
    if (params !== undefined) this.run(this.api.call(cancelLoggerFile, { params }));
  }

  /** Has the file's readings taken out again. */
  takeOut(): void {
    const params = this.params();
    if (params !== undefined) this.run(this.api.call(takeOutLoggerFile, { params }));
  }

  private isFileAtWork(): boolean {
    const file = this.file();
    return file !== null && isAtWork(file);
  }

  private run(call: Observable<LoggerFile>): void {
    this.awaited(call).subscribe({
      next: (file) => this.takeOver(file),
      error: (error: unknown) => this.problem.set(failureText(error)),
    });
  }

  private sendMatches(matches: Matches): Observable<unknown> {
    const params = this.params();
    if (params === undefined) return EMPTY;
    return this.awaited(this.api.call(matchLoggerFile, { params, body: matches })).pipe(
      tap((file) => this.resource.set(file)),
      // What could not be matched is said; the next choice is sent all the same.
      catchError((error: unknown) => {
        this.problem.set(failureText(error));
        return EMPTY;
      }),
    );
  }

  private awaited<T>(call: Observable<T>): Observable<T> {
    this.problem.set(null);
    this.work.update((count) => count + 1);
    return call.pipe(finalize(() => this.work.update((count) => count - 1)));
  }

  private takeOver(file: LoggerFile): void {
    // To change a resource that is still loading would break the loading off for good.
    if (!this.resource.hasValue()) return;
    this.resource.set({ ...this.resource.value(), ...file });
  }

  private fetchPlaces(params: { roomId: string }): Observable<Places> {
    return forkJoin([this.api.call(listDevices, { params }), this.api.call(getBoard, { params })]).pipe(
      map(([devices, { at, racks }]) => {
        this.clock.setBy(at);
        const shelves = racks.flatMap((rack) => rack.shelves).map(({ id, label }) => ({ id, label }));
        return { shelves, sensors: sensorChoices(devices, shelves) };
      }),
    );
  }
}

function sensorChoices(devices: readonly Device[], shelves: readonly ShelfChoice[]): SensorChoice[] {
  const labels = new Map(shelves.map(({ id, label }) => [id, label]));
  return devices
    .flatMap(({ name, sensors }) =>
      sensors.map(({ id, quantity, shelfId }) => {
        const shelfLabel = shelfId === null ? null : (labels.get(shelfId) ?? null);
        const words = sensorWords(shelfLabel, quantity);
        return { id, quantity, shelfId, shelfLabel, words, deviceName: name };
      }),
    )
    .sort((a, b) => a.words.localeCompare(b.words, 'en', { numeric: true }));
}
