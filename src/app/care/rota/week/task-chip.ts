import { NgTemplateOutlet } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { MatMenuModule, type MatMenu } from '@angular/material/menu';
import type { Task } from '@shared/contracts/care';
import { lateness } from '../../../core/care/lateness';
import { holderWords, outcomeWord } from '../../../core/care/task-words';
import { careKindLooks } from '../../../ui/care-kind/care-kind-look';
import { RotaData } from '../rota-data';

/** A task of the week; one that is open has a menu for whoever may do something with it. */
@Component({
  selector: 'app-task-chip',
  template: `
    @if (menu(); as menu) {
      <button
        class="chip"
        type="button"
        [class.short]="isShort()"
        [matMenuTriggerFor]="menu"
        [matMenuTriggerData]="{ task: task() }"
      >
        <ng-container [ngTemplateOutlet]="inside" />
      </button>
    } @else {
      <div class="chip" [class.closed]="task().outcome !== null" [class.short]="isShort()">
        <ng-container [ngTemplateOutlet]="inside" />
      </div>
    }
    <ng-template #inside>
      <mat-icon aria-hidden="true">{{ icon() }}</mat-icon>
      <span>
        <b>{{ task().title }}</b>&ngsp;
        @if (place() !== null) {
          <small>{{ place() }}</small>&ngsp;
        }
        @for (note of notes(); track note.text) {
          <small [class.trouble]="note.isTrouble">{{ note.text }}</small>&ngsp;
        }
      </span>
    </ng-template>
  `,
  styleUrl: './task-chip.scss',
  imports: [MatIcon, MatMenuModule, NgTemplateOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TaskChip {
  readonly task = input.required<Task>();
  /** What can be done with it; null where nothing can. */
  readonly menu = input<MatMenu | null>(null);
  /** Whether to say who holds it, where the line does not. */
  readonly saysHolder = input(false);

  private readonly data = inject(RotaData);

  protected readonly place = computed(() => {
    const { shelfLabel, rackName, plantingLabel } = this.task();
    const parts = [plantingLabel, shelfLabel ?? rackName].filter((part) => part !== null);
    return parts.length === 0 ? null : parts.join(' · ');
  });
  protected readonly late = computed(() => {
    const { outcome, inTimeUntil } = this.task();
    return outcome === null ? lateness(inTimeUntil, this.data.today()) : null;
  });
  protected readonly isShort = computed(() => {
    const { outcome, cover } = this.task();
    return outcome === null && (cover === 'short' || cover === 'uncovered');
  });
  protected readonly icon = computed(() => {
    const { outcome, kind } = this.task();
    if (outcome === null) return careKindLooks[kind].icon;
    return outcome === 'done' ? 'check_circle' : 'do_not_disturb_on';
  });
  protected readonly notes = computed(() => {
    const { task, late, isShort } = { task: this.task(), late: this.late(), isShort: this.isShort() };
    const saysHolder = task.outcome === null && (this.saysHolder() || task.cover === 'short');
    return [
      { text: late, isTrouble: true },
      { text: task.outcome === null ? null : outcomeWord(task.outcome), isTrouble: false },
      { text: saysHolder ? holderWords(task) : null, isTrouble: isShort },
      { text: task.swap === null ? null : 'On offer', isTrouble: false },
    ].flatMap(({ text, isTrouble }) => (text === null ? [] : [{ text, isTrouble }]));
  });
}
