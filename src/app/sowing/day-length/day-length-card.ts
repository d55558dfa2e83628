import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatShortDay } from '@shared/format/room-time';
import { failureText } from '../../core/failure-text';
import { ReaderFormat } from '../../core/reader-format';
import { Chart } from '../../ui/chart/chart';
import { Explained } from '../../ui/explained/explained';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { SowingData } from '../sowing-data';
import { dayLengthLines, extremesText, onionText } from './day-length-lines';

/** How long the day is through the year at the room's place, and which onions that suits. */
@Component({
  selector: 'app-day-length-card',
  template: `
    <h2>
      <app-explained
        word="Length of the day"
        meaning="From the moment the sun's upper edge rises until it has set. Plants notice some light before and after, half an hour to an hour more at middle latitudes. Under lamps, the lamps' hours are the plant's day."
      />
    </h2>
    @if (data.dayLength(); as year) {
      @if (year.latitudeDeg === null) {
        <p class="quiet">It follows from where the room is; nobody has said that yet.</p>
      } @else {
        <p>
          {{ onions() }} <span class="quiet">{{ extremes() }}</span>
        </p>
        <app-chart title="Length of the day" zone="UTC" [lines]="lines()" [marks]="marks()" />
      }
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="data.dayLengthResource.reload()" />
    } @else {
      <app-loading-lines [lines]="5" label="Working out the length of the day" />
    }
  `,
  styleUrl: '../sowing-card.scss',
  imports: [Chart, ErrorState, Explained, LoadingLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DayLengthCard {
  private readonly format = inject(ReaderFormat);
  protected readonly data = inject(SowingData);

  protected readonly failure = computed(() => {
    const error = this.data.dayLengthResource.error();
    return error === undefined ? null : failureText(error);
  });
  protected readonly lines = computed(() => {
    const year = this.data.dayLength();
    return year === null ? [] : dayLengthLines(year);
  });
  protected readonly onions = computed(() => {
    const year = this.data.dayLength();
    return year === null ? '' : onionText(year);
  });
  protected readonly extremes = computed(() => {
    const year = this.data.dayLength();
    return year === null
      ? ''
      : extremesText(year, (day) => formatShortDay(`${day}T00:00:00Z`, 'UTC').replace(/^\w+ /, ''));
  });
  protected readonly marks = computed(() => [
    { at: Date.parse(`${this.format.today()}T12:00:00Z`), icon: 'today', text: 'Today' },
  ]);
}
