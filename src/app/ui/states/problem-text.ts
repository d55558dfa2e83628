import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';

/** What went wrong with something a person just did. Read out as soon as it appears. */
@Component({
  selector: 'app-problem-text',
  template: `
    @if (message() !== null) {
      <p><mat-icon aria-hidden="true">error</mat-icon>{{ message() }}</p>
    }
  `,
  styleUrl: './problem-text.scss',
  imports: [MatIcon],
  // The element stays while it is empty: a screen reader only notices changes inside an alert that it knows.
  host: { role: 'alert' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProblemText {
  /** What happened and what to do; null while all is well. */
  readonly message = input.required<string | null>();
}
