import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { NoteLine } from '../note-line/note-line';
import { cautions, type Hazard } from './cautions';

/** One line of the usual caution, at the place where it matters. */
@Component({
  selector: 'app-caution-line',
  template:
    '<app-note-line tone="lamp" [icon]="caution().icon"><b>Usual caution.</b> {{ caution().text }}</app-note-line>',
  imports: [NoteLine],
  host: { role: 'note' },
  styles: ':host { display: block; }',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CautionLine {
  readonly hazard = input.required<Hazard>();

  protected readonly caution = computed(() => cautions[this.hazard()]);
}
