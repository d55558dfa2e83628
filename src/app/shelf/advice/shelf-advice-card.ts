import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import { completeTask, reopenTask, type Task } from '@shared/contracts/care';
import { finalize } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { lampPlanChange, matPlanChange, planQuestion, type PlanChange } from '../../core/plan-change';
import { PlanChanges } from '../../core/plan-changes';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Asking } from '../../ui/dialogs/asking';
import { NoteLine } from '../../ui/note-line/note-line';
import { Sourced } from '../../ui/sourced/sourced';
import { ShelfData } from '../shelf-data';
import { changeText, lampText, matText, standingText, wantedText } from './advice-words';

/** What the shelf should be for what grows on it, and why; what does not go together, and the care that is due. */
@Component({
  selector: 'app-shelf-advice-card',
  templateUrl: './shelf-advice-card.html',
  styleUrl: './shelf-advice-card.scss',
  imports: [MatButton, MatIcon, NoteLine, RouterLink, Sourced],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShelfAdviceCard {
  private readonly api = inject(ApiClient);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);
  private readonly data = inject(ShelfData);
  private readonly plans = inject(PlanChanges);
  private readonly asking = inject(Asking);

  protected readonly advice = this.data.advice;
  protected readonly mayTick = computed(() => this.session.may('helper'));
  private readonly mayPlan = computed(() => this.session.may('grower'));
  /** Tasks that are being ticked. */
  protected readonly busyIds = signal<ReadonlySet<string>>(new Set());

  protected readonly lines = computed(() => {
    const advice = this.advice();
    if (advice === null) return [];
    const { lamps, heatMat } = advice;
    const shelf = this.data.detail()?.shelf ?? null;
    const change = (of: typeof lampPlanChange): PlanChange | null =>
      shelf === null || !this.mayPlan() ? null : of(shelf, advice);
    const lampLine = {
      icon: lamps.state === 'on' ? 'lightbulb' : 'light_off',
      text: lampText(lamps),
      reason: lamps.reason,
      change: changeText(lamps.change),
      plan: change(lampPlanChange),
    };
    const matLine = {
      icon: heatMat.state === 'on' ? 'mode_heat' : 'mode_heat_off',
      text: matText(heatMat),
      reason: heatMat.reason,
      change: changeText(heatMat.change),
      plan: change(matPlanChange),
    };
    return (shelf?.heatMat ?? null) !== null || heatMat.state !== 'off' ? [lampLine, matLine] : [lampLine];
  });
  protected readonly wanted = computed(() => {
    const ranges = this.data.detail()?.wantedRanges ?? [];
    return (this.advice()?.wanted ?? []).map((wanted) => ({
      text: wantedText(wanted, this.session.temperatureUnit()),
      source: wanted.source,
      reason: wanted.reason,
      standing: standingText(wanted, ranges),
    }));
  });
  protected readonly tasks = computed(() =>
    this.data.openTasks().map((task) => ({ task, due: this.format.day(task.dueOn) })),
  );
  protected readonly moves = computed(() =>
    (this.advice()?.moves ?? []).map((move) => ({
      ...move,
      plantings: (this.data.detail()?.plantings ?? []).filter(({ id }) => move.plantingIds.includes(id)),
    })),
  );

  protected changePlan(change: PlanChange): void {
    this.asking.ask(planQuestion(change)).subscribe((isWanted) => {
      if (isWanted) this.plans.make(change);
    });
  }

  protected tick(task: Task): void {
    const params = this.data.params();
    if (params === undefined) return;
    const taskParams = { roomId: params.roomId, taskId: task.id };
    this.busyIds.update((ids) => new Set([...ids, task.id]));
    this.api
      .call(completeTask, { params: taskParams, body: {} })
      .pipe(finalize(() => this.busyIds.update((ids) => new Set([...ids].filter((id) => id !== task.id)))))
      .subscribe({
        next: () => {
          this.data.refreshBoard();
          this.plans
            .sayTicked(task, (question) => this.asking.ask(question))
            .subscribe(() => this.reopen(taskParams));
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  private reopen(params: { readonly roomId: string; readonly taskId: string }): void {
    this.api.call(reopenTask, { params }).subscribe({
      next: () => this.data.refreshBoard(),
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }
}
