import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatShare } from '@shared/format/numbers';
import { failureText } from '../../core/failure-text';
import { careKindLooks } from '../../ui/care-kind/care-kind-look';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { RecordData } from './record-data';
import { spanWords } from './span-words';

/** How much was done in time, for the room and by kind. */
@Component({
  selector: 'app-compliance-card',
  template: `
    <h2>Done in time</h2>
    @if (summary(); as summary) {
      <p>{{ span() }}, of the whole room</p>
      @if (summary.share !== null) {
        <p class="figure">{{ summary.share }}</p>
        <p>{{ summary.words }}</p>
        <table>
          <thead>
            <tr>
              <th scope="col">Kind</th>
              <th scope="col">In time</th>
              <th scope="col">Late</th>
              <th scope="col">Not done</th>
            </tr>
          </thead>
          <tbody>
            @for (line of summary.kinds; track line.kind) {
              <tr>
                <th scope="row">{{ line.word }}</th>
                <td>{{ line.inTime }} of {{ line.due }}</td>
                <td>{{ line.late }}</td>
                <td>{{ line.notDone }}</td>
              </tr>
            }
          </tbody>
        </table>
      } @else {
        <p>Nothing was due in that time.</p>
      }
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="data.complianceResource.reload()" />
    } @else if (span() !== null) {
      <app-loading-lines [lines]="4" label="Summing up the record" />
    }
  `,
  styleUrl: './summary-card.scss',
  imports: [ErrorState, LoadingLines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ComplianceCard {
  protected readonly data = inject(RecordData);

  protected readonly span = computed(() => spanWords(this.data.span()));
  protected readonly summary = computed(() => {
    if (!this.data.complianceResource.hasValue()) return null;
    const { share, due, inTime, kinds } = this.data.complianceResource.value();
    return {
      share: share === null ? null : formatShare(share),
      words: `${inTime} of ${due} tasks were done, or found not needed, in time.`,
      kinds: kinds.map((line) => ({ ...line, word: careKindLooks[line.kind].word })),
    };
  });
  protected readonly failure = computed(() => {
    const error = this.data.complianceResource.error();
    return error === undefined ? null : failureText(error);
  });
}
