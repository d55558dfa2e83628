import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { plantPicture, type PlantFamily, type PlantForm } from './plant-forms';
import { PlantShapes } from './plant-shapes';

/** One plant, cropped to itself. Decorative: the words stand beside it. */
@Component({
  selector: 'app-plant-drawing',
  template: `
    <svg [attr.viewBox]="viewBox()" preserveAspectRatio="xMidYMax meet">
      <svg:g app-plant-shapes [form]="form()" [family]="family()" />
    </svg>
  `,
  styles:
    ':host { display: inline-block; width: 36px; height: 48px; } svg { display: block; width: 100%; height: 100%; }',
  imports: [PlantShapes],
  host: { 'aria-hidden': 'true' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlantDrawing {
  readonly form = input.required<PlantForm>();
  readonly family = input.required<PlantFamily>();

  protected readonly viewBox = computed(() => {
    const { breadth, height } = plantPicture(this.form(), this.family());
    return `${-breadth / 2} ${-height - 1} ${breadth} ${height + 2}`;
  });
}
