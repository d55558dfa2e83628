import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { listSeedLots, type SeedLot } from '@shared/contracts/seed';
import { ApiClient } from '../core/api-client';
import { failureText } from '../core/failure-text';
import { KeptPhotos } from '../core/kept-photos';
import { Session } from '../core/session';
import { EmptyState } from '../ui/states/empty-state';
import { ErrorState } from '../ui/states/error-state';
import { LoadingLines } from '../ui/states/loading-lines';
import { ageWords, basisWords, leftWords, lotTitle, shareWords, standingOf } from './seed-words';

/** The room's seed: what to sow first, what is left of it, and how much of it may come up. */
@Component({
  selector: 'app-seed-page',
  templateUrl: './seed-page.html',
  styleUrl: './seed-page.scss',
  imports: [
    EmptyState,
    ErrorState,
    LoadingLines,
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatInput,
    RouterLink,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SeedPage {
  /** From the address: "all" shows what was put aside too. */
  readonly show = input<string>();
  /** From the address: words that a lot must have. */
  readonly find = input<string>();

  private readonly api = inject(ApiClient);
  private readonly kept = inject(KeptPhotos);
  private readonly router = inject(Router);
  private readonly session = inject(Session);

  protected readonly showsAll = computed(() => this.show() === 'all');
  protected readonly mayAdd = computed(() => this.session.may('grower'));

  protected readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId, withFinished: this.showsAll() };
    },
    stream: ({ params: { roomId, withFinished } }) =>
      this.api.call(listSeedLots, {
        params: { roomId },
        query: { finished: withFinished ? 'with' : 'without' },
      }),
  });
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });
  private readonly lots = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  protected readonly hasAny = computed(() => (this.lots()?.length ?? 0) > 0);
  protected readonly lines = computed(() => {
    const words = (this.find() ?? '').toLowerCase().split(/\s+/).filter(Boolean);
    return (
      this.lots()
        ?.filter((lot) => {
          const text = `${lotTitle(lot)} ${lot.source} ${lot.lotNumber}`.toLowerCase();
          return words.every((word) => text.includes(word));
        })
        .map((lot) => this.line(lot)) ?? null
    );
  });

  protected search(words: string): void {
    this.changeAddress({ find: words.trim() === '' ? null : words });
  }

  protected showAll(isAll: boolean): void {
    this.changeAddress({ show: isAll ? 'all' : null });
  }

  private changeAddress(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }

  private line(lot: SeedLot) {
    return {
      id: lot.id,
      title: lotTitle(lot),
      age: ageWords(lot),
      left: leftWords(lot),
      badge: standingOf(lot),
      expected: lot.expectation === null ? null : shareWords(lot.expectation),
      basis: lot.expectation === null ? '' : basisWords(lot.expectation),
      photo: lot.photo && this.kept.thumbnailOf(lot.photo),
    };
  }
}
