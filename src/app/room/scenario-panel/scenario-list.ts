import { inject, Injectable, signal } from '@angular/core';
import { listScenarios, startScenario, stopScenario } from '@shared/contracts/scenarios';
import type { ScenarioListResponse, ScenarioRun, StartScenarioRequest } from '@shared/contracts/simulation';
import { switchMap, tap, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';

/** What the simulator can play in a room, and what it plays. */
@Injectable()
export class ScenarioList {
  private readonly api = inject(ApiClient);
  private readonly listed = signal<ScenarioListResponse | null>(null);

  /** Null until fetched, and in a room that no simulator plays. */
  readonly list = this.listed.asReadonly();

  /** Fetches the list. */
  fetch(roomId: string): Observable<unknown> {
    return this.api
      .call(listScenarios, { params: { roomId } })
      .pipe(tap((list) => this.listed.set(list.scenarios.length === 0 ? null : list)));
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
