import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The lamp over a shelf, lit or not. Decorative: the words "lamps on" stand beside it. */
@Component({
  selector: 'app-lamp-bar',
  template: '',
  styleUrl: './lamp-bar.scss',
  host: { 'aria-hidden': 'true', '[class.lit]': 'lit() === true', '[class.unknown]': 'lit() === null' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LampBar {
  /** Whether the lamp gives light now; null when no sensor says. */
  readonly lit = input.required<boolean | null>();
}
