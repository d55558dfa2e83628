import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import { MatIcon } from '@angular/material/icon';

let shown = 0;

/** A word of the trade with its meaning behind a button. */
@Component({
  selector: 'app-explained',
  template: `
    <span class="word"
      >{{ word()
      }}<button
        type="button"
        [attr.aria-label]="'What is ' + word() + '?'"
        [attr.aria-expanded]="isOpen()"
        [attr.aria-controls]="id"
        (click)="isOpen.set(!isOpen())"
      >
        <mat-icon aria-hidden="true">help</mat-icon>
      </button></span
    >
    <span class="meaning" role="note" [id]="id" [hidden]="!isOpen()">{{ meaning() }}</span>
  `,
  styleUrl: './explained.scss',
  imports: [MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Explained {
  readonly word = input.required<string>();
  readonly meaning = input.required<string>();

  protected readonly id = `explained-${(shown += 1)}`;
  protected readonly isOpen = signal(false);
}
