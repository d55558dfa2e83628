import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { ChartTable } from './chart-table';

/** A chart's numbers to be read one by one. */
@Component({
  selector: 'app-chart-numbers',
  template: `
    <div class="scroll" tabindex="0" role="region" [attr.aria-label]="'Numbers of ' + title()">
      <table>
        <caption class="read-out-only">
          {{
            title()
          }}
        </caption>
        <thead>
          <tr>
            <th scope="col">from</th>
            @for (column of table().columns; track $index) {
              <th scope="col">{{ column }}</th>
            }
          </tr>
        </thead>
        <tbody>
          @for (row of table().rows; track $index) {
            <tr>
              <th scope="row">{{ row.when }}</th>
              @for (cell of row.cells; track $index) {
                <td>{{ cell }}</td>
              }
            </tr>
          }
        </tbody>
      </table>
    </div>
  `,
  styleUrl: './chart-numbers.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ChartNumbers {
  readonly title = input.required<string>();
  readonly table = input.required<ChartTable>();
}
