import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import type { FileSeries } from '@shared/contracts/logger-files';
import type { SensorChoice, ShelfChoice } from '../logger-file-data';
import { goalOf, goalText, type SeriesGoal } from './series-goal';

/** Where the readings of one series go: to a sensor of the room, to a new one, or nowhere. */
@Component({
  selector: 'app-series-choice',
  templateUrl: './series-choice.html',
  styleUrl: './choice.scss',
  imports: [MatFormFieldModule, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SeriesChoice {
  readonly series = input.required<FileSeries>();
  readonly sensors = input.required<readonly SensorChoice[]>();
  readonly shelves = input.required<readonly ShelfChoice[]>();
  readonly mayMatch = input.required<boolean>();
  /** Whether the unit is chosen here: in a file whose rows name their quantity, no column has one. */
  readonly hasUnit = input(false);
  readonly matched = output<SeriesGoal>();
  readonly unitChosen = output<string>();

  protected readonly name = computed(() => {
    const { sensorName, name } = this.series();
    return [sensorName, name].filter((part) => part !== '').join(' · ') || 'no name';
  });
  protected readonly goal = computed(() => goalText(this.series()));

  private readonly fitting = computed(() =>
    this.sensors().filter(({ quantity }) => quantity === this.series().quantity),
  );
  /** The best sensor for it, where the series names one. */
  protected readonly proposed = computed(() => {
    const best = this.series().proposals[0]?.sensorId;
    return this.fitting().filter(({ id }) => id === best);
  });
  protected readonly others = computed(() =>
    this.fitting().filter((sensor) => !this.proposed().includes(sensor)),
  );
  /** The chosen sensor shortly; null where the list's own words are shown. */
  protected readonly chosenWords = computed(
    () => this.sensors().find(({ id }) => id === this.series().sensorId)?.words ?? null,
  );
  /** Why the chosen sensor was proposed; null for one that was not. */
  protected readonly reason = computed(() => {
    const { proposals, sensorId } = this.series();
    return proposals.find((proposal) => proposal.sensorId === sensorId)?.reason ?? null;
  });

  protected choose(goal: string): void {
    this.matched.emit(goalOf(goal));
  }
}
