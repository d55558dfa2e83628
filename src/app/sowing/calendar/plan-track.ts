import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { SowingPlan } from '@shared/contracts/sowing';
import { partOf, type CalendarPart, type CalendarSpan } from './calendar-span';

/** A crop's windows and sowings on the months, for the eye alone: the words stand beside it. */
@Component({
  selector: 'app-plan-track',
  template: `
    @for (month of span().months; track month.start) {
      <i class="month" [style.left.%]="100 * month.start"></i>
    }
    @if (window(); as window) {
      <i class="window" [style.left.%]="100 * window.start" [style.width.%]="100 * window.breadth"></i>
    }
    @for (sowing of sowings(); track $index) {
      <i class="sowing" [style.left.%]="100 * sowing.start"></i>
    }
    @for (sown of sown(); track $index) {
      <i class="sown" [style.left.%]="100 * sown.start"></i>
    }
    @if (frost(); as frost) {
      <i class="frost" [style.left.%]="100 * frost.start"></i>
    }
    @if (now(); as now) {
      <i class="now" [style.left.%]="100 * now.start"></i>
    }
  `,
  styleUrl: './plan-track.scss',
  host: { 'aria-hidden': 'true' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlanTrack {
  readonly span = input.required<CalendarSpan>();
  readonly today = input.required<string>();
  readonly plan = input.required<SowingPlan>();

  protected readonly window = computed(() => {
    const window = this.plan().window;
    return window === null ? null : partOf(this.span(), window.opens, window.closes);
  });
  protected readonly sowings = computed(() => this.at(this.plan().sowings.map(({ on }) => on)));
  protected readonly sown = computed(() => this.at(this.plan().sownOn));
  protected readonly frost = computed(() => {
    const { lastFrost } = this.plan();
    return lastFrost === null ? null : partOf(this.span(), lastFrost, lastFrost);
  });
  protected readonly now = computed(() => partOf(this.span(), this.today(), this.today()));

  private at(days: readonly string[]): CalendarPart[] {
    return days.map((day) => partOf(this.span(), day, day)).filter((part) => part !== null);
  }
}
