import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { clockAt, instantOnClock, quietChoices } from '@shared/alerts/quiet-choices';
import { ReaderFormat } from '../../core/reader-format';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { ProblemText } from '../../ui/states/problem-text';

const longestMs = 7 * 86_400_000;

/** Asks until when an alert is to be quiet: a tap for the usual times, or any other within a week. */
@Component({
  selector: 'app-quiet-panel',
  template: `
    <p>
      No mail about this kind of alert on this shelf until then, whoever it would go to. It stays visible
      here. A danger to the plants is an alert of its own and writes all the same.
    </p>
    <div class="choices">
      @for (choice of choices(); track choice.words) {
        <button matButton="tonal" type="button" [disabled]="isBusy()" (click)="chosen.emit(choice.until)">
          {{ choice.words }}<small>&nbsp;· {{ choice.when }}</small>
        </button>
      }
    </div>
    <form (submit)="$event.preventDefault(); choose()" novalidate>
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>Another time, by the room’s clock</mat-label>
        <input matInput type="datetime-local" [formControl]="other" [min]="earliest()" [max]="latest()" />
      </mat-form-field>
      <app-problem-text [message]="problem()" />
      <div class="actions">
        <button matButton="outlined" type="submit" [disabled]="isBusy()">Quiet until this time</button>
        <button matButton type="button" (click)="left.emit()">Leave it</button>
      </div>
    </form>
  `,
  styleUrl: './panel.scss',
  imports: [MatButton, MatFormFieldModule, MatInput, ProblemText, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class QuietPanel {
  readonly isBusy = input(false);

  /** Until when [ms since 1970 UTC]. */
  readonly chosen = output<number>();
  readonly left = output();

  private readonly clock = inject(RoomClock);
  private readonly format = inject(ReaderFormat);
  private readonly zone = inject(Session).timeZone;

  protected readonly choices = computed(() =>
    quietChoices(this.clock.calmNow(), this.zone()).map((choice) => ({
      ...choice,
      when: this.format.when(new Date(choice.until).toISOString()),
    })),
  );
  protected readonly earliest = computed(() => clockAt(this.clock.calmNow(), this.zone()));
  protected readonly latest = computed(() => clockAt(this.clock.calmNow() + longestMs, this.zone()));
  protected readonly other = new FormControl('', { nonNullable: true });
  protected readonly problem = signal<string | null>(null);

  protected choose(): void {
    const until = instantOnClock(this.other.value, this.zone());
    const problem = problemOf(until, this.clock.now());
    this.problem.set(problem);
    if (until !== null && problem === null) this.chosen.emit(until);
  }
}

function problemOf(until: number | null, now: number): string | null {
  if (until === null) return 'Give a day and a time.';
  if (until <= now) return 'That time is over already.';
  if (until > now + longestMs)
    return 'A week is the longest. If the alert is wrong for longer, change the wanted range of the shelf.';
  return null;
}
