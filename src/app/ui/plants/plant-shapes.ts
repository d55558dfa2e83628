import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { plantPicture, type PlantFamily, type PlantForm } from './plant-forms';

/** The paths of one plant, to stand inside a drawing. */
@Component({
  selector: 'svg:g[app-plant-shapes]',
  template: `
    @for (shape of picture().shapes; track $index) {
      <svg:path
        [attr.class]="shape.width === null ? 'fill ' + shape.paint : 'line ' + shape.paint"
        [attr.d]="shape.d"
        [attr.stroke-width]="shape.width"
      />
    }
  `,
  styleUrl: './plant-shapes.scss',
  host: { '[class]': 'family()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlantShapes {
  readonly form = input.required<PlantForm>();
  readonly family = input.required<PlantFamily>();

  protected readonly picture = computed(() => plantPicture(this.form(), this.family()));
}
