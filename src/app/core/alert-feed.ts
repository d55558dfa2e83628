import { inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { listAlerts } from '@shared/contracts/alerts';
import { catchError, EMPTY, map, merge, switchMap, tap, type Observable } from 'rxjs';
import { AlertInbox } from './alert-inbox';
import { ApiClient } from './api-client';
import { LiveConnection } from './live-connection';
import { Session } from './session';

const mostOpen = 200;

/** Fills the inbox and keeps it current while somebody is signed in. */
@Injectable({ providedIn: 'root' })
export class AlertFeed {
  private readonly api = inject(ApiClient);
  private readonly inbox = inject(AlertInbox);
  private readonly session = inject(Session);
  private readonly failed = signal<unknown>(null);

  /** Why the open alerts could not be fetched; null when they were. */
  readonly failure = this.failed.asReadonly();

  constructor() {
    const live = inject(LiveConnection);
    const roomId = toObservable(this.session.roomId).pipe(tap(() => this.inbox.hold(null)));
    merge(roomId, live.caughtUp)
      .pipe(
        switchMap(() => this.fetch()),
        takeUntilDestroyed(),
      )
      .subscribe();
    live
      .on('alert:changed')
      .pipe(takeUntilDestroyed())
      .subscribe((alert) => this.inbox.takeOver(alert));
  }

  /** Fetches the open alerts again. */
  refresh(): void {
    this.fetch().subscribe();
  }

  private fetch(): Observable<unknown> {
    const roomId = this.session.roomId();
    if (roomId === null) return EMPTY;
    return this.api.call(listAlerts, { params: { roomId }, query: { open: 'true', limit: mostOpen } }).pipe(
      map(({ alerts }) => alerts),
      tap((alerts) => {
        this.failed.set(null);
        this.inbox.hold(alerts);
      }),
      // Said where the alerts are listed; the badge just stays as it was.
      catchError((error: unknown) => {
        this.failed.set(error);
        return EMPTY;
      }),
    );
  }
}
