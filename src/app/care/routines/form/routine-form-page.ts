import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { rxResource, takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';
import { careKinds, type CareKind } from '@shared/care/care-kind';
import { comingDays } from '@shared/care/coming-days';
import { weekdayOf } from '@shared/care/rota';
import { monthNames, sayTiming } from '@shared/care/timing-words';
import { getRota } from '@shared/contracts/care-rota';
import { addRoutine, changeRoutine, type Routine } from '@shared/contracts/care-routines';
import { dayAfter } from '@shared/growing/calendar-day';
import { map, type Observable } from 'rxjs';
import { ApiClient, newIdempotencyKey } from '../../../core/api-client';
import { serverWords } from '../../../core/field-problems';
import { FormSaving } from '../../../core/form-saving';
import { Notices } from '../../../core/notices';
import { ReaderFormat } from '../../../core/reader-format';
import { RoomShelves } from '../../../core/room-shelves';
import { Session } from '../../../core/session';
import { careKindLooks } from '../../../ui/care-kind/care-kind-look';
import { EmptyState } from '../../../ui/states/empty-state';
import { ErrorState } from '../../../ui/states/error-state';
import { LoadingLines } from '../../../ui/states/loading-lines';
import { ProblemText } from '../../../ui/states/problem-text';
import { dayWords } from '../../day-words';
import { RoomRoutines } from '../room-routines';
import { fillRoutineForm, routineDraftOf, routineForm } from './routine-fields';
import { TimingPart } from './timing-part';
import { WhereChoices } from './where-choices';
import { WhoPart } from './who-part';

const previewedDays = 5;

/** Adds a routine, or changes one. */
@Component({
  selector: 'app-routine-form-page',
  templateUrl: './routine-form-page.html',
  styleUrl: './routine-form-page.scss',
  imports: [
    EmptyState,
    ErrorState,
    LoadingLines,
    MatButton,
    MatCheckbox,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    ProblemText,
    ReactiveFormsModule,
    RouterLink,
    TimingPart,
    WhoPart,
  ],
  providers: [FormSaving, RoomRoutines, RoomShelves, WhereChoices],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RoutineFormPage {
  /** From the path: the routine that is changed; none for a new one. */
  readonly routineId = input<string>();
  /** From the address: what to begin with. */
  readonly kind = input<string>();
  readonly planting = input<string>();
  readonly shelf = input<string>();

  private readonly api = inject(ApiClient);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  protected readonly routines = inject(RoomRoutines);
  protected readonly where = inject(WhereChoices);
  // One for the whole page: sending again after a lost answer adds nothing twice.
  private readonly idempotencyKey = newIdempotencyKey();
  private readonly firstDay = untracked(this.format.today);

  protected readonly form = routineForm(this.firstDay);
  protected readonly controls = this.form.controls;
  protected readonly said = serverWords;
  protected readonly kinds = careKinds.map((kind) => ({ kind, word: careKindLooks[kind].word }));
  protected readonly months = monthNames.map((name, index) => ({ month: index + 1, name }));
  protected readonly saving = inject(FormSaving);
  protected readonly wasTried = signal(false);

  protected readonly isNew = computed(() => this.routineId() === undefined);
  protected readonly changed = computed<Routine | null>(
    () => this.routines.all()?.find(({ id }) => id === this.routineId()) ?? null,
  );
  protected readonly title = computed(() => {
    if (this.isNew()) return 'Add a routine';
    const changed = this.changed();
    return changed === null ? 'Routine' : `Change “${changed.title}”`;
  });
  protected readonly isReady = computed(
    () => this.where.groups() !== null && (this.isNew() || this.changed() !== null),
  );
  protected readonly isGone = computed(
    () => !this.isNew() && this.routines.all() !== null && this.changed() === null,
  );
  protected readonly failure = computed(() => this.where.failure() ?? this.routines.failure());

  private readonly closedResource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    // A week tells the usual closed days; whether one day far away is closed nobody plans by.
    stream: ({ params }) =>
      this.api.call(getRota, {
        params,
        query: { from: this.firstDay, to: dayAfter(this.firstDay, 7) },
      }),
  });
  private readonly value = toSignal(this.form.valueChanges.pipe(map(() => this.form.getRawValue())), {
    initialValue: this.form.getRawValue(),
  });
  protected readonly canDry = computed(() => this.value().place.startsWith('planting:'));
  protected readonly isLimited = computed(() => this.value().season.isLimited);
  protected readonly lacksPlanting = computed(() => this.value().timing.how === 'byDrying' && !this.canDry());
  /** When it is due in words, and the next days; null while when is not filled in. */
  protected readonly preview = computed(() => {
    const { season, skipsClosedDays } = this.value();
    const draft = routineDraftOf(this.form);
    if (draft === null) return null;
    const today = this.format.today();
    const isClosed = (day: string): boolean => skipsClosedDays && this.closedWeekdays().has(weekdayOf(day));
    const days = comingDays(
      draft.timing,
      { season: season.isLimited ? season : null, isClosed },
      today,
      previewedDays,
    );
    return {
      words: sayTiming(draft.timing, draft.season),
      days: days.map((day) => dayWords(day, today)),
    };
  });
  private readonly closedWeekdays = computed(() => {
    const week = this.closedResource.hasValue() ? this.closedResource.value().week : [];
    return new Set(week.filter(({ isClosed }) => isClosed).map(({ weekday }) => weekday));
  });

  constructor() {
    effect(() => {
      const [kind, planting, shelf] = [this.kind(), this.planting(), this.shelf()];
      untracked(() => {
        const known = careKinds.find((one) => one === kind);
        if (known !== undefined) this.controls.kind.setValue(known);
        if (planting !== undefined) this.controls.place.setValue(`planting:${planting}`);
        else if (shelf !== undefined) this.controls.place.setValue(`shelf:${shelf}`);
      });
    });
    effect(() => {
      const routine = this.changed();
      // A routine that is fetched again must not undo what was typed meanwhile.
      if (routine !== null && this.form.pristine) untracked(() => fillRoutineForm(this.form, routine));
    });
    this.suggestTitle(this.controls.kind.value);
    this.controls.kind.valueChanges.pipe(takeUntilDestroyed()).subscribe((kind) => this.suggestTitle(kind));
  }

  protected retry(): void {
    this.where.reload();
    this.routines.resource.reload();
  }

  protected save(): void {
    if (this.saving.isSaving()) return;
    this.wasTried.set(true);
    const call = this.call();
    if (call === null) {
      this.form.markAllAsTouched();
      this.saving.problem.set('Some fields need another look; they say what.');
      return;
    }
    this.saving.send(this.form, call, ({ title }) => {
      this.notices.say(this.isNew() ? `“${title}” added` : `“${title}” changed`);
      void this.router.navigate(['/care/routines'], { replaceUrl: true });
    });
  }

  private call(): Observable<Routine> | null {
    const [roomId, routineId, body] = [this.session.roomId(), this.routineId(), routineDraftOf(this.form)];
    if (roomId === null || body === null) return null;
    if (routineId !== undefined) return this.api.call(changeRoutine, { params: { roomId, routineId }, body });
    return this.api.call(addRoutine, { params: { roomId }, body, idempotencyKey: this.idempotencyKey });
  }

  /** What somebody typed stays; only an untouched title follows the kind. */
  private suggestTitle(kind: CareKind): void {
    if (!this.isNew() || !this.controls.title.pristine) return;
    this.controls.title.setValue(kind === 'other' ? '' : careKindLooks[kind].word);
  }
}
