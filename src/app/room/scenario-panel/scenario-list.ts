import { inject, Injectable, signal } from '@angular/core';
import { listScenarios, startScenario, stopScenario } from '@shared/contracts/scenarios';
import type { ScenarioListResponse, ScenarioRun, StartScenarioRequest } from '@shared/contracts/simulation';
import { catchError, of, switchMap, tap, throwError, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { asApiFailure } from '../../core/api-failure';

/** What the simulator can play in a room, and what it plays. */
@Injectable()
export class ScenarioList {
  private readonly api = inject(ApiClient);
  private readonly listed = signal<ScenarioListResponse | null>(null);

  /** Null until fetched, and in a room that no simulator plays. */
  readonly list = this.listed.asReadonly();

  /** Fetches the list. A room without a simulator answers as if there were no such thing, which is no failure. */
  fetch(roomId: string): Observable<ScenarioListResponse | null> {
    return this.api.call(listScenarios, { params: { roomId } }).pipe(
      catchError((error: unknown) =>
        asApiFailure(error).kind === 'notFound' ? of(null) : throwError(() => error),
      ),
      tap((list) => this.listed.set(list)),
    );
  }

  /** Starts a scenario and fetches the list again. */
  start(roomId: string, scenario: StartScenarioRequest): Observable<unknown> {
    return this.api
      .call(startScenario, { params: { roomId }, body: scenario })
      .pipe(switchMap(() => this.fetch(roomId)));
  }

  /** Ends a scenario before its time and fetches the list again. */
  stop(roomId: string, { run }: ScenarioRun): Observable<unknown> {
    return this.api.call(stopScenario, { params: { roomId, run } }).pipe(switchMap(() => this.fetch(roomId)));
  }
}
