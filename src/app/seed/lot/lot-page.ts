import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { Router, RouterLink } from '@angular/router';
import { addSeedLotPhoto } from '@shared/contracts/photos';
import { changeSeedLot, removeSeedLot } from '@shared/contracts/seed';
import { formatValue } from '@shared/format/numbers';
import { filter, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { KeptPhotos } from '../../core/kept-photos';
import { Notices } from '../../core/notices';
import { PhotoSender } from '../../core/photo-sender';
import { ReaderFormat } from '../../core/reader-format';
import { Asking } from '../../ui/dialogs/asking';
import { Explained } from '../../ui/explained/explained';
import { PhotoStrip } from '../../ui/photos/photo-strip';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { ageWords, amountWords, lotTitle, shareWords, standingOf } from '../seed-words';
import { LotData } from './lot-data';
import { LotLeft } from './lot-left';
import { LotTests } from './lot-tests';
import { SeedsNeededCard } from './seeds-needed-card';

/** One lot of seed: how old, how good, how much is left, and what became of it. */
@Component({
  selector: 'app-lot-page',
  templateUrl: './lot-page.html',
  styleUrl: './lot-page.scss',
  imports: [
    ErrorState,
    Explained,
    LoadingLines,
    LotLeft,
    LotTests,
    MatButton,
    MatIcon,
    PhotoStrip,
    RouterLink,
    SeedsNeededCard,
  ],
  providers: [LotData, PhotoSender],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LotPage {
  /** From the path. */
  readonly lotId = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  protected readonly data = inject(LotData);
  private readonly kept = inject(KeptPhotos);
  protected readonly sender = inject(PhotoSender);

  protected readonly title = computed(() => {
    const lot = this.data.lot();
    return lot === null ? 'Seed' : lotTitle(lot);
  });
  protected readonly badge = computed(() => {
    const lot = this.data.lot();
    return lot === null ? null : standingOf(lot);
  });
  protected readonly age = computed(() => {
    const lot = this.data.lot();
    return lot === null ? '' : ageWords(lot);
  });
  protected readonly ageSources = computed(() => this.data.lot()?.age.sources.join('; ') ?? '');
  protected readonly expected = computed(() => {
    const expectation = this.data.lot()?.expectation ?? null;
    return expectation === null ? null : { share: shareWords(expectation), source: expectation.source };
  });
  protected readonly facts = computed(() => {
    const lot = this.data.lot();
    if (lot === null) return [];
    const price = lot.price === null ? '' : formatValue(lot.price, lot.currency ?? '', 2);
    return [
      { name: 'From', value: lot.source },
      { name: 'Lot number', value: lot.lotNumber },
      { name: 'In it', value: amountWords(lot.amount, lot.unit) },
      { name: 'Price', value: price },
    ].filter(({ value }) => value !== '');
  });
  protected readonly photos = computed(() => {
    const lot = this.data.lot();
    return lot === null ? [] : this.kept.shown(lot.photos, lotTitle(lot));
  });

  constructor() {
    effect(() => this.data.lotId.set(this.lotId()));
  }

  /** Puts the lot aside, or takes it up again, with a way back. */
  protected finish(isFinished: boolean): void {
    const params = this.data.params();
    if (params === undefined) return;
    const finishedOn = isFinished ? this.format.today() : null;
    this.data
      .showing(this.api.call(changeSeedLot, { params, body: { finishedOn } }))
      .pipe(
        switchMap(() =>
          this.notices.sayUndoable(
            isFinished ? `${this.title()} put aside` : `${this.title()} is in stock again`,
          ),
        ),
      )
      .subscribe({
        next: () => this.finish(!isFinished),
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  protected remove(): void {
    const params = this.data.params();
    if (params === undefined) return;
    this.asking
      .ask({
        title: `Remove ${this.title()}?`,
        text: 'It is taken off the list with its tests and photos, as if it had never been written down. To keep its story, put it aside instead.',
        confirm: 'Remove the lot',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() => this.api.call(removeSeedLot, { params })),
      )
      .subscribe({
        next: () => {
          this.notices.say(`${this.title()} removed`);
          void this.router.navigate(['/seed']);
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  protected addPhoto({ file, caption }: { readonly file: File; readonly caption: string }): void {
    const params = this.data.params();
    if (params === undefined) return;
    this.sender.send(
      file,
      (form) => this.api.upload(addSeedLotPhoto, { params, query: { caption }, form }),
      (photo) => this.data.resource.update((lot) => lot && { ...lot, photos: [photo, ...lot.photos] }),
    );
  }

  protected removePhoto(photoId: string): void {
    this.kept
      .remove(photoId, (question) => this.asking.ask(question))
      .subscribe(() =>
        this.data.resource.update(
          (lot) => lot && { ...lot, photos: lot.photos.filter(({ id }) => id !== photoId) },
        ),
      );
  }
}
