import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';

/** What belongs on an empty screen, and the first step (projected) towards it. */
@Component({
  selector: 'app-empty-state',
  template: `
    <mat-icon aria-hidden="true">{{ icon() }}</mat-icon>
    <h2>{{ title() }}</h2>
    <p>{{ text() }}</p>
    <div class="actions"><ng-content /></div>
  `,
  styleUrl: './state.scss',
  imports: [MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EmptyState {
  /** Name of a Material symbol. */
  readonly icon = input.required<string>();
  readonly title = input.required<string>();
  readonly text = input.required<string>();
}
