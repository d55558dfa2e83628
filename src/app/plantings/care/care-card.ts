import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatSelectModule } from '@angular/material/select';
import { RouterLink } from '@angular/router';
import type { CareKind } from '@shared/care/care-kind';
import { sayTiming } from '@shared/care/timing-words';
import { adoptRoutines, listReadyMadeRoutines, listRoutines } from '@shared/contracts/care-routines';
import { formatShortDay } from '@shared/format/room-time';
import { finalize } from 'rxjs';
import { ApiClient, newIdempotencyKey } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { RoomMembers } from '../../core/room-members';
import { Session } from '../../core/session';
import { careKindLooks } from '../../ui/care-kind/care-kind-look';
import { ErrorState } from '../../ui/states/error-state';
import { ProblemText } from '../../ui/states/problem-text';
import { PlantingData } from '../planting/planting-data';

const onDuty = 'onDuty';
/** What seed and seedlings need from their first day. */
const youngKinds: readonly CareKind[] = ['water', 'inspect'];

/** The care that a planting gets, and what its crop usually gets besides, to choose from. */
@Component({
  selector: 'app-care-card',
  templateUrl: './care-card.html',
  styleUrl: './care-card.scss',
  imports: [
    ErrorState,
    MatButton,
    MatCheckbox,
    MatFormFieldModule,
    MatIcon,
    MatSelectModule,
    ProblemText,
    RouterLink,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CareCard {
  /** The planting has only just started: what is usual stands open, what it needs now is chosen. */
  readonly isOffered = input(false, { transform: booleanAttribute });

  private readonly api = inject(ApiClient);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);
  protected readonly data = inject(PlantingData);
  protected readonly members = inject(RoomMembers);
  private idempotencyKey = newIdempotencyKey();

  protected readonly onDuty = onDuty;
  protected readonly who = signal<string>(onDuty);
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<string | null>(null);
  protected readonly mayPlan = computed(
    () => this.session.may('grower') && this.data.planting()?.stage !== 'ended',
  );

  protected readonly routinesResource = rxResource({
    params: this.data.params,
    stream: ({ params: { roomId, plantingId } }) =>
      this.api.call(listRoutines, { params: { roomId }, query: { plantingId } }),
  });
  private readonly cropId = computed(() => this.data.planting()?.cropId ?? null);
  private readonly usualResource = rxResource({
    params: () => {
      const [roomId, cropId] = [this.session.roomId(), this.cropId()];
      return roomId === null || cropId === null || !this.mayPlan() ? undefined : { roomId, cropId };
    },
    stream: ({ params: { roomId, cropId } }) =>
      this.api.call(listReadyMadeRoutines, { params: { roomId }, query: { cropId } }),
  });
  private readonly routines = computed(() =>
    this.routinesResource.hasValue() ? this.routinesResource.value() : null,
  );
  protected readonly lines = computed(
    () =>
      this.routines()?.map(({ id, kind, title, timing, season, nextDueOn }) => ({
        id,
        icon: careKindLooks[kind].icon,
        title,
        when: sayTiming(timing, season),
        next: nextDueOn === null ? 'not planned yet' : this.dayWords(nextDueOn),
      })) ?? null,
  );
  protected readonly failure = computed(() => {
    const error = this.routinesResource.error();
    return error === undefined ? null : failureText(error);
  });
  /** What is usual and not yet kept; what has the same title is kept already. */
  protected readonly usual = computed(() => {
    const routines = this.routines();
    if (routines === null || !this.usualResource.hasValue()) return [];
    const kept = new Set(routines.map(({ title }) => title));
    return this.usualResource
      .value()
      .filter(({ title }) => !kept.has(title))
      .map(({ id, kind, title, timing, season, amount }) => ({
        id,
        kind,
        title,
        when: [sayTiming(timing, season), amount].filter((part) => part !== '').join(' · '),
      }));
  });
  /** Too young to be fed, trimmed or picked; that can be added when it has grown. */
  protected readonly isYoung = computed(() => {
    const stage = this.data.planting()?.stage;
    return stage === 'sown' || stage === 'emerging' || stage === 'seedling';
  });
  protected readonly crop = computed(() => this.data.planting()?.crop.toLowerCase() ?? '');
  protected readonly isOpen = linkedSignal(() => this.isOffered());
  protected readonly chosen = linkedSignal<ReadonlySet<string>>(() => {
    const offered = this.isOffered() ? this.usual() : [];
    const atOnce = this.isYoung() ? offered.filter(({ kind }) => youngKinds.includes(kind)) : offered;
    return new Set(atOnce.map(({ id }) => id));
  });

  protected open(): void {
    this.members.want();
    this.isOpen.set(true);
  }

  protected choose(id: string, isChosen: boolean): void {
    const others = [...this.chosen()].filter((one) => one !== id);
    this.chosen.set(new Set(isChosen ? [...others, id] : others));
  }

  protected adopt(): void {
    const [params, who] = [this.data.params(), this.who()];
    const readyMadeIds = [...this.chosen()];
    if (params === undefined || this.isSaving()) return;
    if (readyMadeIds.length === 0) {
      this.problem.set('Choose some of it first.');
      return;
    }
    this.isSaving.set(true);
    this.problem.set(null);
    this.api
      .call(adoptRoutines, {
        params,
        body: { readyMadeIds, who: who === onDuty ? { how: onDuty } : { how: 'person', personId: who } },
        idempotencyKey: this.idempotencyKey,
      })
      .pipe(finalize(() => this.isSaving.set(false)))
      .subscribe({
        next: (routines) => {
          this.idempotencyKey = newIdempotencyKey();
          this.isOpen.set(false);
          this.routinesResource.reload();
          this.notices.say(routines.length === 1 ? 'One routine added' : `${routines.length} routines added`);
        },
        error: (error: unknown) => this.problem.set(failureText(error)),
      });
  }

  /** A day of the calendar has no time zone, so it is written as UTC counts it. */
  private dayWords(day: string): string {
    return day === this.format.today() ? 'today' : formatShortDay(`${day}T00:00:00Z`, 'UTC');
  }
}
