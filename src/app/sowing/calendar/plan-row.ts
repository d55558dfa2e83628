import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import type { SowingPlan } from '@shared/contracts/sowing';
import { ReaderFormat } from '../../core/reader-format';
import { NoteLine } from '../../ui/note-line/note-line';
import { Sourced } from '../../ui/sourced/sourced';
import type { CalendarSpan } from './calendar-span';
import { PlanTrack } from './plan-track';
import { transplantWords, windowWords } from './plan-words';

/** One crop of the calendar: when to sow it at a glance, and what can be done about it inside. */
@Component({
  selector: 'app-plan-row',
  templateUrl: './plan-row.html',
  styleUrl: './plan-row.scss',
  imports: [MatButton, NoteLine, PlanTrack, RouterLink, Sourced],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlanRow {
  readonly plan = input.required<SowingPlan>();
  readonly span = input.required<CalendarSpan>();
  /** The room's day, `YYYY-MM-DD`. */
  readonly today = input.required<string>();
  readonly mayPlan = input(false);
  /** Whether what can be done about it shows at first. */
  readonly isOpen = input(false);

  /** A care task is wanted, due on that day. */
  readonly taskWanted = output<string>();
  readonly changeWanted = output();
  readonly removalWanted = output();

  private readonly format = inject(ReaderFormat);
  private readonly dayWords = (day: string): string => this.format.day(day);

  protected readonly words = computed(() => windowWords(this.plan(), this.today(), this.dayWords));
  protected readonly sown = computed(() => {
    const last = this.plan().sownOn.at(-1);
    return last === undefined ? null : `sown ${this.dayWords(last)}`;
  });
  /** The days to sow on that can still be kept; a single one that has passed may be kept while the window is open. */
  protected readonly sowings = computed(() => {
    const [plan, today] = [this.plan(), this.today()];
    const isOver = plan.standing === 'past';
    const sowings = plan.sowings.map((sowing) => ({
      on: sowing.on,
      day: this.dayWords(sowing.on),
      ready: transplantWords(sowing, this.dayWords),
      source: sowing.transplantSource ?? '',
      isOver: isOver || (sowing.on < today && plan.everyDays !== null),
      taskOn: sowing.on < today ? today : sowing.on,
    }));
    return sowings.length === 0 ? null : sowings;
  });
  /** How its sowings follow each other, for the button that changes it. */
  protected readonly interval = computed(() => {
    const { everyDays } = this.plan();
    if (everyDays === null) return 'Sow bit by bit';
    return everyDays === 1 ? 'Every day' : `Every ${everyDays} days`;
  });
  protected readonly sources = computed(() =>
    this.plan().bySource.map(({ opens, closes, source }) => ({
      words: `${this.dayWords(opens)} to ${this.dayWords(closes)}`,
      source,
    })),
  );
}
