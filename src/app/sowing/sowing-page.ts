import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { SowingPlan } from '@shared/contracts/sowing';
import { switchMap } from 'rxjs';
import { Notices } from '../core/notices';
import { ReaderFormat } from '../core/reader-format';
import { NoteLine } from '../ui/note-line/note-line';
import { EmptyState } from '../ui/states/empty-state';
import { ErrorState } from '../ui/states/error-state';
import { LoadingLines } from '../ui/states/loading-lines';
import { calendarSpan } from './calendar/calendar-span';
import { planGroups } from './calendar/plan-groups';
import { PlanRow } from './calendar/plan-row';
import { CropChoiceDialog, type ChoiceSubject } from './choice/crop-choice-dialog';
import { DayLengthCard } from './day-length/day-length-card';
import { PlaceCard } from './place/place-card';
import { SowingData } from './sowing-data';

/** When to sow what: this week first, then the year, and the place that it all follows from. */
@Component({
  selector: 'app-sowing-page',
  templateUrl: './sowing-page.html',
  styleUrl: './sowing-page.scss',
  imports: [
    DayLengthCard,
    EmptyState,
    ErrorState,
    LoadingLines,
    MatButton,
    MatIcon,
    NoteLine,
    PlaceCard,
    PlanRow,
    RouterLink,
  ],
  providers: [SowingData],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SowingPage {
  private readonly dialog = inject(MatDialog);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  protected readonly data = inject(SowingData);

  protected readonly span = computed(() => calendarSpan(this.data.calendar()?.today ?? this.format.today()));
  protected readonly groups = computed(() => {
    const calendar = this.data.calendar();
    return calendar === null ? [] : planGroups(calendar);
  });
  /** What this week asks for, in a sentence. */
  protected readonly week = computed(() => {
    const calendar = this.data.calendar();
    if (calendar === null || calendar.plans.length === 0) return '';
    const due = calendar.thisWeek.map(({ cropName, on }) => `${cropName} (${this.format.day(on)})`);
    return due.length === 0 ? 'Nothing is to be sown this week.' : `Sow this week: ${due.join(', ')}.`;
  });

  /** @param plan - Null to put a further crop on the calendar. */
  protected chooseCrop(plan: SowingPlan | null): void {
    const data: ChoiceSubject = {
      plan,
      chosenIds: (this.data.calendar()?.plans ?? []).map(({ cropId }) => cropId),
      save: (cropId, everyDays) => this.data.choose(cropId, everyDays),
    };
    this.dialog.open<CropChoiceDialog, ChoiceSubject>(CropChoiceDialog, { data, maxWidth: '480px' });
  }

  protected makeTask({ cropId, cropName }: SowingPlan, on: string): void {
    this.data.addTask(cropId, on).subscribe({
      next: ({ dueOn }) => this.notices.say(`Care task made: sow ${cropName}, ${this.format.day(dueOn)}`),
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }

  protected takeOff({ cropId, cropName, everyDays }: SowingPlan): void {
    this.data
      .unchoose(cropId)
      .pipe(
        switchMap(() => this.notices.sayUndoable(`${cropName} taken off the calendar`)),
        switchMap(() => this.data.choose(cropId, everyDays)),
      )
      .subscribe({ error: (error: unknown) => this.notices.sayFailure(error) });
  }
}
