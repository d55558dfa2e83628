import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { getSeedsNeeded } from '@shared/contracts/seed';
import { debounceTime, tap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { asApiFailure } from '../../core/api-failure';
import { failureText } from '../../core/failure-text';
import { NoteLine } from '../../ui/note-line/note-line';
import { neededWords } from '../seed-words';
import { LotData } from './lot-data';

const restMs = 300;
const mostPlants = 10_000;

/** How many seeds of the lot to sow for a number of plants, and whether that is still in the packet. */
@Component({
  selector: 'app-seeds-needed-card',
  template: `
    <h2>How many to sow</h2>
    <mat-form-field appearance="outline" subscriptSizing="dynamic" hideRequiredMarker>
      <mat-label>Plants wanted</mat-label>
      <input matInput type="number" min="1" inputmode="numeric" [formControl]="plants" />
      <mat-hint>Enough in 9 of 10 sowings.</mat-hint>
      <mat-error>A whole number from 1 to 10 000.</mat-error>
    </mat-form-field>
    <p role="status">{{ answer() }}</p>
    @if (isShort()) {
      <app-note-line tone="ember" icon="warning" text="That is more than is left in the packet." />
    }
  `,
  styleUrl: './lot-card.scss',
  imports: [MatFormFieldModule, MatInput, NoteLine, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SeedsNeededCard {
  private readonly api = inject(ApiClient);
  private readonly data = inject(LotData);

  protected readonly plants = new FormControl<number | null>(12, {
    validators: [
      Validators.required,
      Validators.min(1),
      Validators.max(mostPlants),
      Validators.pattern(/^\d+$/),
    ],
  });
  private readonly isCurrent = signal(true);
  private readonly wanted = toSignal(
    this.plants.valueChanges.pipe(
      tap(() => this.isCurrent.set(false)),
      debounceTime(restMs),
      tap(() => this.isCurrent.set(true)),
    ),
    { initialValue: 12 },
  );
  private readonly resource = rxResource({
    // Anew when the lot changes: a test, or a recount, changes the answer.
    params: () => {
      const [params, lot, plants] = [this.data.params(), this.data.lot(), this.wanted()];
      return params === undefined || lot === null || plants === null || this.plants.invalid
        ? undefined
        : { params, lot, plants };
    },
    stream: ({ params: { params, plants } }) => this.api.call(getSeedsNeeded, { params, query: { plants } }),
  });
  private readonly needed = computed(() =>
    this.isCurrent() && this.resource.hasValue() ? this.resource.value() : null,
  );
  protected readonly answer = computed(() => {
    const [needed, error] = [this.needed(), this.resource.error()];
    if (needed !== null) return neededWords(needed, this.data.lot()?.unit ?? 'seeds');
    if (error === undefined) return '';
    return asApiFailure(error).code === 'GERMINATION_UNKNOWN'
      ? 'That can’t be said while nothing is known of how this seed germinates. Test some on damp paper.'
      : failureText(error);
  });
  protected readonly isShort = computed(() => this.needed()?.isEnoughLeft === false);
}
