import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';
import { listPlantings } from '@shared/contracts/plantings';
import { finalize, merge } from 'rxjs';
import type * as z from 'zod';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { LiveConnection } from '../../core/live-connection';
import { Notices } from '../../core/notices';
import { RoomShelves } from '../../core/room-shelves';
import { Session } from '../../core/session';
import { EmptyState } from '../../ui/states/empty-state';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { plantingGroups, plantingsFound, type Grouping } from './planting-groups';
import { PlantingRow } from './planting-row';

const pageSize = 200;

/** What grows in the room, by shelf or by stage. */
@Component({
  selector: 'app-plantings-page',
  templateUrl: './plantings-page.html',
  styleUrl: './plantings-page.scss',
  imports: [
    EmptyState,
    ErrorState,
    LoadingLines,
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatInput,
    MatSelectModule,
    PlantingRow,
    RouterLink,
  ],
  providers: [RoomShelves],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlantingsPage {
  /** From the address: "stage" puts them under their stages. */
  readonly by = input<string>();
  /** From the address: "ended" or "all". */
  readonly state = input<string>();
  /** From the address: the id of the only shelf that is shown. */
  readonly shelf = input<string>();
  /** From the address: words that a planting must have. */
  readonly find = input<string>();

  private readonly api = inject(ApiClient);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  private readonly places = inject(RoomShelves);

  protected readonly states = [
    { state: null, word: 'Growing' },
    { state: 'ended', word: 'Ended' },
    { state: 'all', word: 'All' },
  ] as const;
  protected readonly groupings = [
    { by: null, word: 'By shelf' },
    { by: 'stage', word: 'By stage' },
  ] as const;
  /** Null for those that grow. */
  protected readonly chosenState = computed(() => {
    const state = this.state();
    return state === 'ended' || state === 'all' ? state : null;
  });
  protected readonly grouping = computed<Grouping>(() => (this.by() === 'stage' ? 'stage' : 'shelf'));
  protected readonly mayAdd = computed(() => this.session.may('grower'));
  protected readonly shelves = this.places.shelves;

  private readonly query = computed<z.input<typeof listPlantings.query>>(() => ({
    state: this.chosenState() ?? 'growing',
    shelfId: this.shelf(),
    limit: pageSize,
  }));
  protected readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId, query: this.query() };
    },
    stream: ({ params: { roomId, query } }) => this.api.call(listPlantings, { params: { roomId }, query }),
  });
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });
  private readonly listed = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  protected readonly nextCursor = computed(() => this.listed()?.nextCursor ?? null);
  protected readonly isLoadingMore = signal(false);
  protected readonly hasAny = computed(() => (this.listed()?.plantings.length ?? 0) > 0);
  protected readonly isNarrowed = computed(
    () => this.find() !== undefined || this.shelf() !== undefined || this.chosenState() !== null,
  );
  protected readonly groups = computed(() => {
    const listed = this.listed();
    if (listed === null) return null;
    const shelfIds = this.shelves().map(({ id }) => id);
    return plantingGroups(plantingsFound(listed.plantings, this.find() ?? ''), this.grouping(), shelfIds);
  });

  constructor() {
    const live = inject(LiveConnection);
    merge(live.on('room:changed'), live.caughtUp)
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.resource.reload());
  }

  protected showMore(): void {
    const [roomId, cursor] = [this.session.roomId(), this.nextCursor()];
    if (roomId === null || cursor === null) return;
    this.isLoadingMore.set(true);
    this.api
      .call(listPlantings, { params: { roomId }, query: { ...this.query(), cursor } })
      .pipe(finalize(() => this.isLoadingMore.set(false)))
      .subscribe({
        next: (page) =>
          this.resource.update((held) => ({
            ...page,
            plantings: [...(held?.plantings ?? []), ...page.plantings],
          })),
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  protected change(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }
}
