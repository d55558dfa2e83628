import { ChangeDetectionStrategy, Component, input, output } from '@angular/core';
import { MatIcon } from '@angular/material/icon';

/** A tick for one wet thumb. It shows what it is told and never ticks itself. */
@Component({
  selector: 'app-tick',
  template: `
    <button
      type="button"
      role="checkbox"
      [attr.aria-checked]="isChecked()"
      [attr.aria-label]="label()"
      [disabled]="isDisabled()"
      (click)="chosen.emit()"
    >
      <span [class.checked]="isChecked()">
        @if (isChecked()) {
          <mat-icon aria-hidden="true">{{ icon() }}</mat-icon>
        }
      </span>
    </button>
  `,
  styleUrl: './tick.scss',
  imports: [MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Tick {
  readonly isChecked = input.required<boolean>();
  /** What is ticked, for a screen reader. */
  readonly label = input.required<string>();
  readonly isDisabled = input(false);
  /** What stands in it when it is checked. */
  readonly icon = input('check');

  readonly chosen = output();
}
