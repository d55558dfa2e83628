import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { getPlantingDrying } from '@shared/contracts/care-record';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Chart } from '../../ui/chart/chart';
import { Explained } from '../../ui/explained/explained';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { dryingBand, dryingLines, dryingWords, wateringMarks } from './drying-chart';

/** A planting's waterings against how thirsty the air was. */
@Component({
  selector: 'app-drying-card',
  template: `
    <h2>
      <app-explained
        word="Waterings against drying"
        meaning="The vapour pressure deficit of the air, summed over the hours since the last watering, says how much the air has taken. What it comes to at each watering shows how much this planting stands; the green band is where it usually asked for water."
      />
    </h2>
    @if (drying(); as drying) {
      <p>{{ words() }}</p>
      @if (lines().length > 0) {
        <app-chart
          title="Waterings against drying"
          [lines]="lines()"
          [wanted]="band()"
          [marks]="marks()"
          [zone]="zone()"
        />
      } @else {
        <p>There are no readings of temperature and humidity where it stands to draw a line from.</p>
      }
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="resource.reload()" />
    } @else {
      <app-loading-lines [lines]="5" label="Summing up the drying" />
    }
  `,
  styleUrl: './summary-card.scss',
  imports: [Chart, ErrorState, Explained, LoadingLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DryingCard {
  readonly plantingId = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);

  protected readonly zone = this.session.timeZone;
  protected readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId, plantingId: this.plantingId() };
    },
    stream: ({ params }) => this.api.call(getPlantingDrying, { params }),
  });
  protected readonly drying = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });
  protected readonly words = computed(() => {
    const drying = this.drying();
    if (drying === null) return '';
    return dryingWords(drying, drying.dueAt === null ? null : this.format.when(drying.dueAt));
  });
  protected readonly lines = computed(() => {
    const drying = this.drying();
    return drying === null ? [] : dryingLines(drying);
  });
  protected readonly band = computed(() => {
    const drying = this.drying();
    return drying === null ? [] : dryingBand(drying);
  });
  protected readonly marks = computed(() => {
    const drying = this.drying();
    return drying === null ? [] : wateringMarks(drying);
  });
}
