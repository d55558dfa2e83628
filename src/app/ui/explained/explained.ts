import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import { MatIcon } from '@angular/material/icon';

let shown = 0;

/** Words with what there is to say about them behind a button. */
@Component({
  selector: 'app-explained',
  template: `
    <span class="word"
      >{{ word()
      }}<button
        type="button"
        [attr.aria-label]="question() ?? 'What is ' + word() + '?'"
        [attr.aria-expanded]="isOpen()"
        [attr.aria-controls]="id"
        (click)="isOpen.set(!isOpen())"
      >
        <mat-icon aria-hidden="true">{{ icon() }}</mat-icon>
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
  /** What the button asks; null asks what the word is. */
  readonly question = input<string | null>(null);
  readonly icon = input('help');

  protected readonly id = `explained-${(shown += 1)}`;
  protected readonly isOpen = signal(false);
}
