import { NgTemplateOutlet } from '@angular/common';
import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';

/** The pointed label that a grower sticks in a pot: crop and variety, then age or stage. */
@Component({
  selector: 'app-plant-label',
  templateUrl: './plant-label.html',
  styleUrl: './plant-label.scss',
  imports: [NgTemplateOutlet, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlantLabel {
  readonly crop = input.required<string>();
  readonly variety = input<string | null>(null);
  /** Age or stage: "day 274", "sown 21 Nov". */
  readonly note = input<string | null>(null);
  /** Where the label leads; null for a label that is only read. */
  readonly link = input<string | readonly unknown[] | null>(null);
}
