import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { Explained } from '../explained/explained';
import { sourceWords } from './source-words';

/** A figure with who says so behind a button. */
@Component({
  selector: 'app-sourced',
  template: `
    <app-explained
      icon="menu_book"
      [word]="figure()"
      [meaning]="words()"
      [question]="'Who says ' + figure() + '?'"
    />
  `,
  styles: `
    :host {
      display: inline-block;
    }
  `,
  imports: [Explained],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Sourced {
  /** As a person reads it: "18–21 °C". */
  readonly figure = input.required<string>();
  readonly source = input.required<string>();

  protected readonly words = computed(() => sourceWords(this.source()));
}
