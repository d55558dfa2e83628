import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';

/** What a note is about: too much or late, too little, all well, or lamps and cautions. */
export type NoteTone = 'ember' | 'frost' | 'leek' | 'lamp';

/** One sentence on a tinted ground: what is wrong and what to try. */
@Component({
  selector: 'app-note-line',
  template: '<mat-icon aria-hidden="true">{{ icon() }}</mat-icon><span>{{ text() }}<ng-content /></span>',
  styleUrl: './note-line.scss',
  imports: [MatIcon],
  host: { '[class]': 'tone()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NoteLine {
  readonly tone = input.required<NoteTone>();
  /** Name of a Material symbol. */
  readonly icon = input.required<string>();
  readonly text = input('');
}
