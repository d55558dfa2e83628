import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { sourceWords } from './source-words';

let shown = 0;

/** A figure with who says so behind a button. */
@Component({
  selector: 'app-sourced',
  template: `
    <span class="figure"
      >{{ figure()
      }}<button
        type="button"
        [attr.aria-label]="'Who says ' + figure() + '?'"
        [attr.aria-expanded]="isOpen()"
        [attr.aria-controls]="id"
        (click)="isOpen.set(!isOpen())"
      >
        <mat-icon aria-hidden="true">menu_book</mat-icon>
      </button></span
    >
    <span class="source" role="note" [id]="id" [hidden]="!isOpen()">{{ words() }}</span>
  `,
  styleUrl: './sourced.scss',
  imports: [MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Sourced {
  /** As a person reads it: "18–21 °C". */
  readonly figure = input.required<string>();
  readonly source = input.required<string>();

  protected readonly id = `source-${(shown += 1)}`;
  protected readonly isOpen = signal(false);
  protected readonly words = computed(() => sourceWords(this.source()));
}
