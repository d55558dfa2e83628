import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { careHazards } from '@shared/care/care-cautions';
import type { PersonOutcome } from '@shared/care/task-outcome';
import type { CareDays } from '@shared/contracts/care';
import type { Completion } from '../../../core/care/care-deed';
import { amountWords, outcomeWord } from '../../../core/care/task-words';
import type { ShownTask } from '../../../core/care/with-waiting';
import { photoRefusal } from '../../../core/photo-sender';
import { CautionLine } from '../../../ui/caution-line/caution-line';
import { ProblemText } from '../../../ui/states/problem-text';
import { completionForm, completionOf, isPoured } from './completion-fields';

/** What may be done with a task beside ticking it. */
export type TaskDeed = 'takeOver' | 'offer' | 'withdraw' | 'take' | 'remove';

/** How a task is done, what is noted with it, and what else may become of it. */
@Component({
  selector: 'app-task-details',
  templateUrl: './task-details.html',
  styleUrl: './task-details.scss',
  imports: [
    CautionLine,
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TaskDetails {
  readonly shown = input.required<ShownTask>();
  /** Plantings of the room, for what is noted at one of several on a shelf. */
  readonly plantings = input.required<CareDays['plantings']>();
  readonly personId = input.required<string>();
  /** Whether the person may do care. */
  readonly mayDo = input(false);
  /** Whether the person may remove what others added. */
  readonly mayRemoveAny = input(false);
  /** Without it nothing can be handed over: that the server must know at once. */
  readonly hasSignal = input(true);

  readonly closed = output<Completion>();
  readonly photographed = output<File>();
  readonly wanted = output<TaskDeed>();

  private readonly note = viewChild<ElementRef<HTMLTextAreaElement>>('note');
  protected readonly form = completionForm();
  protected readonly problem = signal<string | null>(null);
  protected readonly photoProblem = signal<string | null>(null);
  private readonly typed = toSignal(this.form.valueChanges);

  protected readonly task = computed(() => this.shown().task);
  protected readonly hazards = computed(() => careHazards[this.task().kind]);
  protected readonly isOpen = computed(() => this.task().outcome === null);
  protected readonly isPoured = computed(() => isPoured(this.task().kind));
  protected readonly isPicked = computed(() => this.task().kind === 'pick');
  protected readonly isMine = computed(() =>
    this.task().holders.some(({ personId }) => personId === this.personId()),
  );
  /** Plantings on the task's shelf, where it is about several. */
  protected readonly choices = computed(() => {
    const { plantingId, shelfId } = this.task();
    if (plantingId !== null || shelfId === null || !(this.isPoured() || this.isPicked())) return [];
    const there = this.plantings().filter((one) => one.shelfId === shelfId);
    return there.length > 1 ? there : [];
  });
  protected readonly mustChoose = computed(() => {
    const typed = this.typed();
    const hasAmount = (typed?.grams ?? null) !== null || (typed?.count ?? null) !== null;
    return this.isPicked() && this.choices().length > 1 && hasAmount && (typed?.plantingId ?? '') === '';
  });
  protected readonly noted = computed(() => {
    const task = this.task();
    if (task.outcome === null) return null;
    const amounts = amountWords(task);
    return [outcomeWord(task.outcome), amounts, task.note].filter((part) => part !== '').join(' · ');
  });
  protected readonly photoCount = computed(() => this.task().photoIds.length);
  protected readonly swap = computed(() => this.task().swap);
  protected readonly mayTakeSwap = computed(() => {
    const swap = this.swap();
    if (swap === null || swap.offeredById === this.personId()) return false;
    return swap.toPersonId === null || swap.toPersonId === this.personId();
  });
  protected readonly mayRemove = computed(
    () => this.task().routineId === null && this.isOpen() && (this.isMine() || this.mayRemoveAny()),
  );

  protected close(outcome: PersonOutcome): void {
    this.problem.set(this.problemOf(outcome));
    if (this.problem() !== null) return;
    this.closed.emit(completionOf(this.form, outcome));
    this.form.reset();
  }

  protected photograph(chooser: HTMLInputElement): void {
    const file = chooser.files?.[0];
    // The same picture may be chosen again after a failure.
    chooser.value = '';
    if (file === undefined) return;
    this.photoProblem.set(photoRefusal(file));
    if (this.photoProblem() === null) this.photographed.emit(file);
  }

  private problemOf(outcome: PersonOutcome): string | null {
    if (this.form.invalid) {
      this.form.markAllAsTouched();
      return 'Check what is marked, then choose again.';
    }
    if (outcome === 'done') return this.mustChoose() ? 'Say which planting this was picked from.' : null;
    if (this.form.controls.note.value.trim() !== '') return null;
    this.note()?.nativeElement.focus();
    return 'Say why in the note: one word will do.';
  }
}
