import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';

/** Something could not be fetched: what happened, what was not lost, and a way to try again. */
@Component({
  selector: 'app-error-state',
  template: `
    <div role="alert">
      <mat-icon aria-hidden="true">cloud_off</mat-icon>
      <h2>{{ title() }}</h2>
      <p>{{ message() }}</p>
    </div>
    <div class="actions">
      <button matButton="outlined" type="button" (click)="retried.emit()">Try again</button>
    </div>
  `,
  styleUrl: './state.scss',
  imports: [MatButton, MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ErrorState {
  readonly title = input('This could not be loaded');
  /** What happened, and what to do if trying again does not help. */
  readonly message = input.required<string>();
  readonly retried = output();
}
