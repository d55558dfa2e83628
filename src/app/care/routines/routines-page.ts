import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatMenuModule } from '@angular/material/menu';
import { Router, RouterLink } from '@angular/router';
import { sayTiming } from '@shared/care/timing-words';
import { endRoutine, type Routine } from '@shared/contracts/care-routines';
import { dayAfter } from '@shared/growing/calendar-day';
import { filter, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { RoomMembers } from '../../core/room-members';
import { Session } from '../../core/session';
import { careKindLooks } from '../../ui/care-kind/care-kind-look';
import { Asking } from '../../ui/dialogs/asking';
import { EmptyState } from '../../ui/states/empty-state';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { dayWords } from '../day-words';
import { RoomRoutines } from './room-routines';
import { routineGroups } from './routine-groups';
import { whoWords } from './who-words';

/** What care recurs where, when and by whom. */
@Component({
  selector: 'app-routines-page',
  templateUrl: './routines-page.html',
  styleUrl: './routines-page.scss',
  imports: [
    EmptyState,
    ErrorState,
    LoadingLines,
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatIconButton,
    MatInput,
    MatMenuModule,
    RouterLink,
  ],
  providers: [RoomRoutines],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RoutinesPage {
  /** From the address: words that a routine must have. */
  readonly find = input<string>();

  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly format = inject(ReaderFormat);
  private readonly members = inject(RoomMembers);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  protected readonly data = inject(RoomRoutines);

  protected readonly mayChange = computed(() => this.session.may('grower'));
  protected readonly hasAny = computed(() => (this.data.all()?.length ?? 0) > 0);
  private readonly names = computed(() => {
    const members = this.members.caring();
    return members === null ? null : new Map(members.map(({ personId, name }) => [personId, name]));
  });
  protected readonly groups = computed(() => {
    const words = (this.find() ?? '').toLowerCase().split(/\s+/).filter(Boolean);
    const routines = this.data.all()?.filter((routine) => {
      const text = `${routine.title} ${routine.placeLabel ?? 'room'} ${careKindLooks[routine.kind].word}`;
      return words.every((word) => text.toLowerCase().includes(word));
    });
    if (routines === undefined) return null;
    return routineGroups(routines).map((group) => ({
      ...group,
      lines: group.routines.map((routine) => this.line(routine)),
    }));
  });

  constructor() {
    this.members.want();
  }

  protected search(words: string): void {
    const find = words.trim() === '' ? null : words;
    void this.router.navigate([], {
      queryParams: { find },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  protected end({ id, title }: Routine): void {
    this.asking
      .ask({
        title: `End “${title}”?`,
        text: 'Its open tasks go. What was done stays in the record.',
        confirm: 'End the routine',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() =>
          this.api.call(endRoutine, { params: { roomId: this.session.roomId() ?? '', routineId: id } }),
        ),
      )
      .subscribe({
        next: () => {
          this.notices.say(`“${title}” ended`);
          this.data.resource.reload();
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  private line(routine: Routine) {
    const { kind, timing, season, who, nextDueOn, windowDays, minutes, amount } = routine;
    const when = sayTiming(timing, season);
    const today = this.format.today();
    return {
      routine,
      icon: careKindLooks[kind].icon,
      when: when.charAt(0).toUpperCase() + when.slice(1),
      how: [amount, `about ${minutes} min`].filter((part) => part !== '').join(' · '),
      who: whoWords(who, this.names()),
      next: nextWords(nextDueOn, today),
      isLate: nextDueOn !== null && dayAfter(nextDueOn, windowDays) < today,
    };
  }
}

function nextWords(nextDueOn: string | null, today: string): string {
  if (nextDueOn === null) return 'Not planned yet';
  return `${nextDueOn < today ? 'Was due' : 'Next'} ${dayWords(nextDueOn, today)}`;
}
