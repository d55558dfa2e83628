import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { PlantShapes } from './plant-shapes';
import { trayLayout, type TrayPlanting } from './tray-layout';

const breadth = 420;
const height = 66;
const ground = 57;
const margin = 6;
const gap = 2;

/** A shelf's plants on their board, each at the size of its stage. Decorative: the labels say what grows there. */
@Component({
  selector: 'app-plant-tray',
  templateUrl: './plant-tray.html',
  styleUrl: './plant-tray.scss',
  imports: [PlantShapes],
  host: { 'aria-hidden': 'true' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlantTray {
  readonly plantings = input.required<readonly TrayPlanting[]>();

  protected readonly viewBox = `0 0 ${breadth} ${height}`;
  protected readonly ground = ground;
  private readonly layout = computed(() => trayLayout(this.plantings(), breadth - 2 * margin));

  protected readonly boards = computed(() => {
    const boards = this.layout().boards;
    const whole = [{ x: 0, breadth: breadth - 2 * margin }];
    return (boards.length === 0 ? whole : boards).map((board) => ({
      x: board.x + margin + gap,
      breadth: Math.max(0, board.breadth - 2 * gap),
    }));
  });

  protected readonly plants = computed(() =>
    this.layout().plants.map(({ form, family, x, size, turn }) => ({
      form,
      family,
      place: `translate(${(x + margin).toFixed(1)} ${ground}) scale(${(size * turn).toFixed(3)} ${size.toFixed(3)})`,
    })),
  );
}
