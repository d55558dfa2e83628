import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatRadioModule } from '@angular/material/radio';
import { MatSelectModule } from '@angular/material/select';
import { map, startWith, switchMap } from 'rxjs';
import { serverWords } from '../../../core/field-problems';
import { RoomMembers } from '../../../core/room-members';
import type { RoutineForm } from './routine-fields';

/** Asks who does a routine. */
@Component({
  selector: 'app-who-part',
  template: `
    <ng-container [formGroup]="form()">
      <mat-radio-group class="wide" aria-label="Who does it" formControlName="how">
        <mat-radio-button value="onDuty">Whoever is on duty</mat-radio-button>
        <mat-radio-button value="person">One person</mat-radio-button>
        <mat-radio-button value="inTurn">Several in turn</mat-radio-button>
        <mat-radio-button value="pair">Two together</mat-radio-button>
      </mat-radio-group>
      @if (how() === 'person') {
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Person</mat-label>
          <mat-select formControlName="personId">
            @for (member of members.caring() ?? []; track member.personId) {
              <mat-option [value]="member.personId">{{ member.name }}</mat-option>
            }
          </mat-select>
          <mat-hint>While they are away, the task stands as uncovered.</mat-hint>
          <mat-error>{{ said(form().controls.personId) }}</mat-error>
        </mat-form-field>
      } @else if (how() !== 'onDuty') {
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>People</mat-label>
          <mat-select multiple formControlName="personIds">
            @for (member of members.caring() ?? []; track member.personId) {
              <mat-option [value]="member.personId">{{ member.name }}</mat-option>
            }
          </mat-select>
          <mat-hint>{{
            how() === 'pair'
              ? 'Two: care that one should not do alone.'
              : 'Each time it falls to whoever has least to do.'
          }}</mat-hint>
          <mat-error>{{ said(form().controls.personIds) }}</mat-error>
        </mat-form-field>
      }
      @if (isShort()) {
        <p class="wide wrong" role="alert">{{ shortWords() }}</p>
      }
      @if (members.failure(); as failure) {
        <p class="wide wrong" role="alert">{{ failure }}</p>
      }
    </ng-container>
  `,
  styleUrl: './routine-part.scss',
  imports: [MatFormFieldModule, MatRadioModule, MatSelectModule, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WhoPart {
  readonly form = input.required<RoutineForm['controls']['who']>();
  /** Somebody tried to keep it, so what is missing is said. */
  readonly wasTried = input(false);

  protected readonly members = inject(RoomMembers);
  protected readonly said = serverWords;

  private readonly state = toSignal(
    toObservable(this.form).pipe(
      switchMap((form) =>
        form.valueChanges.pipe(
          startWith(null),
          map(() => ({ how: form.controls.how.value, isShort: form.hasError('who') })),
        ),
      ),
    ),
  );
  protected readonly how = computed(() => this.state()?.how ?? 'onDuty');
  protected readonly isShort = computed(() => this.wasTried() && this.state()?.isShort === true);
  protected readonly shortWords = computed(() => {
    const how = this.how();
    if (how === 'person') return 'Choose who does it.';
    return how === 'pair' ? 'Choose two people.' : 'Choose two people or more to take turns.';
  });

  constructor() {
    this.members.want();
  }
}
