import { ChangeDetectionStrategy, Component, computed, inject, linkedSignal, signal } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatIcon } from '@angular/material/icon';
import { finalize } from 'rxjs';
import { newIdempotencyKey } from '../../core/api-client';
import { serverWords, showFieldProblems } from '../../core/field-problems';
import { RoomClock } from '../../core/room-clock';
import { fieldTime, typedInstant } from '../../core/room-instant';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';
import { WhenField } from '../../ui/when-field/when-field';
import { PlantingData } from '../planting/planting-data';

/** How many are up: for a phone in one hand, with the other one wet. */
@Component({
  selector: 'app-quick-count',
  templateUrl: './quick-count.html',
  styleUrl: './quick-count.scss',
  imports: [MatButton, MatCheckbox, MatIcon, ProblemText, ReactiveFormsModule, WhenField],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class QuickCount {
  private readonly clock = inject(RoomClock);
  private readonly data = inject(PlantingData);
  private readonly session = inject(Session);

  protected readonly sown = computed(() => this.data.planting()?.sown ?? 0);
  private readonly before = computed(() => this.data.planting()?.up ?? 0);
  /** What is typed; null for an empty field. Begins with what was up before. */
  protected readonly up = linkedSignal<number | null>(() => this.before());
  protected readonly isPossible = computed(() => {
    const up = this.up();
    return up !== null && Number.isInteger(up) && up >= 0 && up <= this.sown();
  });
  protected readonly beforeWords = computed(() =>
    this.before() === 0 ? `None of ${this.sown()} so far.` : `${this.before()} of ${this.sown()} so far.`,
  );
  protected readonly form = new FormGroup({
    at: new FormControl('', { nonNullable: true }),
    isLast: new FormControl(false, { nonNullable: true }),
    // Stands for the number, so that the server's words about it find their place.
    up: new FormControl<number | null>(null, { validators: [Validators.min(0)] }),
  });
  protected readonly said = serverWords;
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);
  protected readonly earliest = computed(() => {
    const planting = this.data.planting();
    return planting === null ? null : fieldTime(planting.startedAt, this.session.timeZone());
  });
  protected readonly now = computed(() => fieldTime(this.clock.calmNow(), this.session.timeZone()));
  private idempotencyKey = newIdempotencyKey();

  protected step(by: 1 | -1): void {
    this.up.update((up) => Math.min(this.sown(), Math.max(0, (up ?? 0) + by)));
  }

  protected type(text: string): void {
    this.up.set(text.trim() === '' ? null : Number(text));
  }

  protected save(): void {
    const up = this.up();
    if (this.isSaving()) return;
    if (up === null || !this.isPossible()) {
      this.problem.set(`Count from 0 to ${this.sown()}: that many seeds were sown.`);
      return;
    }
    const { at, isLast } = this.form.getRawValue();
    this.isSaving.set(true);
    this.problem.set(null);
    this.form.controls.up.setErrors(null);
    const body = { kind: 'counted' as const, up, isLast, at: typedInstant(at, this.session.timeZone()) };
    this.data
      .take({ via: 'observation', body }, `${up} up, noted`, this.idempotencyKey)
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: () => {
          this.idempotencyKey = newIdempotencyKey();
          this.form.reset();
        },
        error: (error: unknown) => {
          const rest = showFieldProblems(this.form, error);
          this.problem.set(serverWords(this.form.controls.up) ?? rest);
        },
      });
  }
}
