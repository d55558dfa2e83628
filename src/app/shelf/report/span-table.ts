import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import type { Quantity } from '@shared/climate/quantity';
import { formatShare } from '@shared/format/numbers';
import { formatBareQuantity, shownUnit } from '@shared/format/quantities';
import { failureText } from '../../core/failure-text';
import { Session } from '../../core/session';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { chartedQuantities, quantityTitle } from '../quantity-title';
import { ShelfData } from '../shelf-data';
import { spanWords } from '../span/shelf-span';

/** Low, mean and high of each quantity over the span, how long it was right, and how much of the time is known. */
@Component({
  selector: 'app-span-table',
  template: `
    <h2>{{ title() }}</h2>
    @if (rows(); as rows) {
      <table>
        <thead>
          <tr>
            <th scope="col"><span class="read-out-only">Quantity</span></th>
            <th scope="col">low</th>
            <th scope="col">mean</th>
            <th scope="col">high</th>
            <th scope="col">in range</th>
            <th scope="col">held</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows; track row.quantity) {
            <tr>
              <th scope="row">
                {{ row.title }} <small>{{ row.unit }}</small>
              </th>
              <td>{{ row.low }}</td>
              <td>{{ row.mean }}</td>
              <td>{{ row.high }}</td>
              <td>{{ row.inRange }}</td>
              <td>{{ row.held }}</td>
            </tr>
          } @empty {
            <tr>
              <td class="none" colspan="6">Nothing was measured in this span.</td>
            </tr>
          }
        </tbody>
      </table>
      <p>“Held” is the share of the time that readings cover. “In range” counts only that time.</p>
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="data.reportResource.reload()" />
    } @else {
      <app-loading-lines [lines]="4" label="Loading the table" />
    }
  `,
  styleUrl: './report.scss',
  imports: [ErrorState, LoadingLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SpanTable {
  protected readonly data = inject(ShelfData);
  private readonly session = inject(Session);

  protected readonly title = computed(() => spanWords(this.data.choice()));
  protected readonly failure = computed(() => {
    const error = this.data.reportResource.error();
    return error === undefined ? null : failureText(error);
  });
  protected readonly rows = computed(() => {
    const report = this.data.report();
    const temperatureUnit = this.session.temperatureUnit();
    if (report === null) return null;
    const statistics = [...report.statistics].sort((a, b) => placeOf(a.quantity) - placeOf(b.quantity));
    return statistics.map(({ quantity, min, mean, max, inRange, coverage }) => {
      const bare = (value: number | null): string => formatBareQuantity(quantity, value, temperatureUnit);
      return {
        quantity,
        title: quantityTitle(quantity),
        unit: shownUnit(quantity, temperatureUnit),
        low: bare(min),
        mean: bare(mean),
        high: bare(max),
        inRange: formatShare(inRange),
        held: formatShare(coverage),
      };
    });
  });
}

/** As the charts stand, then what has none. */
function placeOf(quantity: Quantity): number {
  const place = chartedQuantities.indexOf(quantity);
  return place === -1 ? chartedQuantities.length : place;
}
