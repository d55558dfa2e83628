import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { takeUntilDestroyed, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import type { ScenarioId, ScenarioRun } from '@shared/contracts/simulation';
import { catchError, EMPTY, switchMap, type Observable } from 'rxjs';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { ScenarioList } from './scenario-list';

const usualMinutes = 30;
const mostMinutes = 7 * 24 * 60;

/** In the demonstration: lets something go wrong in the room on purpose. Shows nothing where there is no simulator. */
@Component({
  selector: 'app-scenario-panel',
  templateUrl: './scenario-panel.html',
  styleUrl: './scenario-panel.scss',
  imports: [MatButton, MatFormFieldModule, MatInput, MatSelectModule, ReactiveFormsModule],
  providers: [ScenarioList],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScenarioPanel {
  readonly roomId = input.required<string>();
  /** Labels of the shelves on which something can go wrong. */
  readonly shelfLabels = input.required<readonly string[]>();

  private readonly scenarios = inject(ScenarioList);
  private readonly notices = inject(Notices);
  private readonly format = inject(ReaderFormat);

  protected readonly form = new FormGroup({
    scenario: new FormControl<ScenarioId | null>(null, [Validators.required]),
    shelf: new FormControl('', { nonNullable: true, validators: [Validators.required] }),
    minutes: new FormControl(usualMinutes, {
      nonNullable: true,
      validators: [Validators.required, Validators.min(1), Validators.max(mostMinutes)],
    }),
  });
  protected readonly list = this.scenarios.list;
  protected readonly running = computed(() => {
    const { running, scenarios } = this.list() ?? { running: [], scenarios: [] };
    return running.map((run) => ({
      run,
      title: scenarios.find(({ scenario }) => scenario === run.scenario)?.title ?? run.scenario,
      until: this.format.time(run.to),
    }));
  });

  private readonly chosen = toSignal(this.form.controls.scenario.valueChanges);
  protected readonly description = computed(
    () => this.list()?.scenarios.find(({ scenario }) => scenario === this.chosen())?.description ?? '',
  );

  constructor() {
    toObservable(this.roomId)
      .pipe(
        // Somebody who only looks at the room need not hear that its toy is broken.
        switchMap((roomId) => this.scenarios.fetch(roomId).pipe(catchError(() => EMPTY))),
        takeUntilDestroyed(),
      )
      .subscribe();
  }

  protected start(): void {
    const { scenario, shelf, minutes } = this.form.getRawValue();
    if (this.form.invalid || scenario === null) return;
    this.carryOut(this.scenarios.start(this.roomId(), { scenario, shelf, minutes }));
  }

  protected stop(run: ScenarioRun): void {
    this.carryOut(this.scenarios.stop(this.roomId(), run));
  }

  private carryOut(deed: Observable<unknown>): void {
    deed.subscribe({ error: (error: unknown) => this.notices.sayFailure(error) });
  }
}
