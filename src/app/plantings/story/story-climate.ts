import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { getSeries } from '@shared/contracts/series';
import { forkJoin, map, of } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { shownLines } from '../../core/shown-series';
import { Chart } from '../../ui/chart/chart';
import type { ChartMark } from '../../ui/chart/chart-data';
import { PlantingData } from '../planting/planting-data';
import { eventIcons, eventWords } from '../words/event-words';
import { plantingTitle } from '../words/planting-facts';
import { joinedByShelf, spansOnShelves } from './shelf-spans';

/** The air of the shelves that the planting stood on, with what happened to it as marks. */
@Component({
  selector: 'app-story-climate',
  template: `
    @if (lines().length > 0) {
      <app-chart [title]="title()" [lines]="lines()" [marks]="marks()" [zone]="zone()">
        <h3>Air where it stood</h3>
      </app-chart>
    }
  `,
  styles: ':host { display: block; }',
  imports: [Chart],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StoryClimate {
  private readonly api = inject(ApiClient);
  private readonly clock = inject(RoomClock);
  private readonly data = inject(PlantingData);
  private readonly session = inject(Session);

  protected readonly zone = this.session.timeZone;
  private readonly spans = computed(
    () => {
      const planting = this.data.planting();
      return planting === null ? null : spansOnShelves(planting.places);
    },
    { equal: (one, other) => JSON.stringify(one) === JSON.stringify(other) },
  );
  private readonly resource = rxResource({
    params: () => {
      const [roomId, spans] = [this.session.roomId(), this.spans()];
      return roomId === null || spans === null ? undefined : { roomId, spans };
    },
    stream: ({ params: { roomId, spans } }) => {
      const now = new Date(this.clock.now()).toISOString();
      const calls = spans.map(({ shelfId, shelfLabel, from, to }) =>
        this.api
          .call(getSeries, {
            params: { roomId, shelfId, quantity: 'airTemperature' },
            query: { from, to: to ?? now },
          })
          .pipe(map((series) => ({ shelfLabel, series }))),
      );
      return calls.length === 0 ? of([]) : forkJoin(calls);
    },
  });
  protected readonly lines = computed(() => {
    const unit = this.session.temperatureUnit();
    return joinedByShelf(
      (this.resource.hasValue() ? this.resource.value() : []).map(({ shelfLabel, series }) => ({
        shelfLabel,
        lines: shownLines(series, [], unit),
      })),
    );
  });
  protected readonly marks = computed<ChartMark[]>(() =>
    (this.data.planting()?.events ?? []).map((event) => ({
      at: Date.parse(event.at),
      icon: eventIcons[event.kind],
      text: [eventWords(event), event.note].filter(Boolean).join(': '),
    })),
  );
  protected readonly title = computed(() => {
    const planting = this.data.planting();
    return planting === null ? 'Air where it stood' : `Air where ${plantingTitle(planting)} stood`;
  });
}
