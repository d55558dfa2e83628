import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** Holds the place of what is being fetched. Says so politely; lies still where motion is reduced. */
@Component({
  selector: 'app-loading-lines',
  template: `
    <span class="read-out-only">{{ label() }}</span>
    @for (line of bars(); track line) {
      <i aria-hidden="true"></i>
    }
  `,
  styleUrl: './loading-lines.scss',
  host: { role: 'status' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LoadingLines {
  /** What is awaited, for a screen reader: "Loading the shelves". */
  readonly label = input('Loading');
  /** How many lines to hold the place of, 1 or more. */
  readonly lines = input(3);

  protected readonly bars = computed(() => Array.from({ length: this.lines() }, (_, line) => line));
}
