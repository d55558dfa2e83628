import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { ShelfData } from '../shelf-data';
import { lightRows, lightSummary } from './light-sums';

const fewDays = 7;

/** The light of each day of the span: hours against the plan, and the daily light integral. */
@Component({
  selector: 'app-shelf-light',
  template: `
    <h2>Light a day</h2>
    @if (summary(); as summary) {
      <p class="sum">{{ summary }}</p>
    }
    @if (rows().length > 0) {
      <table>
        <thead>
          <tr>
            <th scope="col">day</th>
            <th scope="col"><span class="read-out-only">share of the plan</span></th>
            <th scope="col">lit</th>
            <th scope="col">DLI</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.day) {
            <tr>
              <th scope="row">
                {{ row.when }}
                @if (row.reservation) {
                  <br /><small>{{ row.reservation }}</small>
                }
              </th>
              <td class="bar">
                <meter
                  min="0"
                  [max]="row.planned || 24"
                  [value]="row.lit"
                  [attr.aria-label]="row.when + ' light'"
                ></meter>
              </td>
              <td>{{ row.hours }}</td>
              <td>{{ row.dli }}</td>
            </tr>
          }
        </tbody>
      </table>
    }
    @if (hiddenDays() > 0) {
      <button matButton class="more" type="button" (click)="showsAll.set(true)">
        Show {{ hiddenDays() }} more days
      </button>
    }
    <p>
      {{
        rows().length > 0 ? 'DLI is the light of a day, in mol/m².' : 'No light was measured in this span.'
      }}
    </p>
  `,
  styleUrl: './report.scss',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShelfLight {
  private readonly data = inject(ShelfData);

  protected readonly showsAll = signal(false);
  private readonly light = computed(() => this.data.report()?.light ?? []);
  private readonly allRows = computed(() => lightRows(this.light(), this.data.today()));
  protected readonly summary = computed(() => lightSummary(this.light()));
  protected readonly rows = computed(() =>
    this.showsAll() ? this.allRows() : this.allRows().slice(0, fewDays),
  );
  protected readonly hiddenDays = computed(() => this.allRows().length - this.rows().length);
}
