import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { formatValue, noValue } from '@shared/format/numbers';
import { failureText } from '../../core/failure-text';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { RecordData } from './record-data';
import { spanWords } from './span-words';

/** What was harvested, by crop and planting. */
@Component({
  selector: 'app-yields-card',
  template: `
    <h2>Harvested</h2>
    @if (crops(); as crops) {
      <p>{{ span() }}</p>
      @if (crops.length > 0) {
        <table>
          <thead>
            <tr>
              <th scope="col">Crop and planting</th>
              <th scope="col">Weight</th>
              <th scope="col">Pieces</th>
              <th scope="col">Times</th>
            </tr>
          </thead>
          <tbody>
            @for (crop of crops; track crop.crop) {
              <tr class="whole">
                <th scope="row">{{ crop.crop }}</th>
                <td>{{ crop.weight }}</td>
                <td>{{ crop.pieces }}</td>
                <td>{{ crop.harvests }}</td>
              </tr>
              @for (planting of crop.plantings; track planting.plantingId) {
                <tr class="part">
                  <th scope="row">
                    <a [routerLink]="['/plantings', planting.plantingId]">{{ planting.label }}</a>
                  </th>
                  <td>{{ planting.weight }}</td>
                  <td>{{ planting.pieces }}</td>
                  <td>{{ planting.harvests }}</td>
                </tr>
              }
            }
          </tbody>
        </table>
      } @else {
        <p>Nothing was weighed or counted in that time.</p>
      }
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="data.yieldsResource.reload()" />
    } @else if (span() !== null) {
      <app-loading-lines [lines]="4" label="Summing up the harvests" />
    }
  `,
  styleUrl: './summary-card.scss',
  imports: [ErrorState, LoadingLines, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class YieldsCard {
  protected readonly data = inject(RecordData);

  protected readonly span = computed(() => spanWords(this.data.span()));
  protected readonly crops = computed(() => {
    if (!this.data.yieldsResource.hasValue()) return null;
    return this.data.yieldsResource.value().crops.map((crop) => ({
      ...amounts(crop),
      crop: crop.crop,
      plantings: crop.plantings.map((planting) => ({
        ...amounts(planting),
        plantingId: planting.plantingId,
        label: planting.label,
      })),
    }));
  });
  protected readonly failure = computed(() => {
    const error = this.data.yieldsResource.error();
    return error === undefined ? null : failureText(error);
  });
}

function amounts({ grams, count, harvests }: { grams: number; count: number; harvests: number }) {
  return {
    weight:
      grams === 0 ? noValue : grams < 1000 ? formatValue(grams, 'g', 0) : formatValue(grams / 1000, 'kg', 2),
    pieces: count === 0 ? noValue : String(count),
    harvests: String(harvests),
  };
}
