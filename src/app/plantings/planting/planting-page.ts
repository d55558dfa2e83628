import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import { Router, RouterLink } from '@angular/router';
import { addPlantingPhoto } from '@shared/contracts/photos';
import { removePlanting, type PlantingDetail } from '@shared/contracts/plantings';
import { formatValue } from '@shared/format/numbers';
import { filter, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { KeptPhotos } from '../../core/kept-photos';
import { Notices } from '../../core/notices';
import { PhotoSender } from '../../core/photo-sender';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Asking } from '../../ui/dialogs/asking';
import { PhotoStrip } from '../../ui/photos/photo-strip';
import { plantLook } from '../../ui/plants/crop-look';
import { PlantDrawing } from '../../ui/plants/plant-drawing';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { CareCard } from '../care/care-card';
import { GerminationCard } from '../germination/germination-card';
import { QuickCount } from '../germination/quick-count';
import { deedLooks, deedsOf, type DeedKind } from '../note/deed';
import { DeedDialog, type DeedSubject } from '../note/deed-dialog';
import { ProgressCard } from '../progress/progress-card';
import { StoryCard } from '../story/story-card';
import { countWords, harvestWords, placeWords, plantingTitle, standingWords } from '../words/planting-facts';
import { CorrectDialog } from './correct-dialog';
import { PlantingData } from './planting-data';

/** One planting: what, where and how far it is, what to do with it, and its story. */
@Component({
  selector: 'app-planting-page',
  templateUrl: './planting-page.html',
  styleUrl: './planting-page.scss',
  imports: [
    CareCard,
    ErrorState,
    GerminationCard,
    LoadingLines,
    MatButton,
    MatIcon,
    PhotoStrip,
    PlantDrawing,
    ProgressCard,
    QuickCount,
    RouterLink,
    StoryCard,
  ],
  providers: [PhotoSender, PlantingData],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlantingPage {
  /** From the path. */
  readonly plantingId = input.required<string>();
  /** From the address: "usual" offers the care that the crop usually gets. */
  readonly care = input<string>();

  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly dialog = inject(MatDialog);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  protected readonly data = inject(PlantingData);
  private readonly kept = inject(KeptPhotos);
  protected readonly sender = inject(PhotoSender);

  protected readonly title = computed(() => {
    const planting = this.data.planting();
    return planting === null ? 'Planting' : plantingTitle(planting);
  });
  protected readonly look = computed(() => {
    const planting = this.data.planting();
    return planting === null ? null : plantLook(planting);
  });
  protected readonly standing = computed(() => {
    const planting = this.data.planting();
    if (planting === null) return '';
    return `${standingWords(planting, this.format.today())} · ${countWords(planting)}`;
  });
  protected readonly place = computed(() => {
    const planting = this.data.planting();
    return planting === null ? '' : placeWords(planting);
  });
  protected readonly facts = computed(() => {
    const planting = this.data.planting();
    if (planting === null) return [];
    const started =
      planting.origin === 'sown' ? 'Sown' : planting.origin === 'split' ? 'Parted' : 'Brought in';
    return [
      { name: started, value: this.format.day(planting.startedOn) },
      { name: 'In', value: planting.container },
      { name: 'Depth', value: planting.depthMm === null ? '' : formatValue(planting.depthMm, 'mm', 0) },
      { name: 'From', value: planting.source },
      { name: 'Harvested', value: harvestWords(planting) ?? '' },
    ].filter(({ value }) => value !== '');
  });
  protected readonly mayCount = computed(() => this.session.may('helper'));
  protected readonly mayGrow = computed(() => this.session.may('grower'));
  protected readonly isSown = computed(() => this.data.planting()?.origin === 'sown');
  protected readonly isAwaited = computed(() => {
    const stage = this.data.planting()?.stage;
    return this.isSown() && this.mayCount() && (stage === 'sown' || stage === 'emerging');
  });
  protected readonly deeds = computed(() => {
    const [planting, role] = [this.data.planting(), this.session.room()?.role];
    if (planting === null || role === undefined) return [];
    return deedsOf(planting, role).map((kind) => ({ kind, ...deedLooks[kind] }));
  });
  protected readonly canRemove = computed(() => this.mayGrow() && this.data.planting()?.events.length === 1);
  protected readonly photos = computed(() => {
    const planting = this.data.planting();
    return planting === null ? [] : this.kept.shown(planting.photos, plantingTitle(planting));
  });

  constructor() {
    effect(() => this.data.plantingId.set(this.plantingId()));
  }

  protected open(kind: DeedKind): void {
    const planting = this.data.planting();
    if (planting === null) return;
    const subject: DeedSubject = { kind, planting, data: this.data };
    this.dialog.open(DeedDialog, { data: subject, width: '480px', maxWidth: '96vw' });
  }

  protected correct(): void {
    this.dialog
      .open<CorrectDialog, PlantingDetail, PlantingDetail>(CorrectDialog, {
        data: this.data.planting(),
        width: '440px',
        maxWidth: '96vw',
      })
      .afterClosed()
      .pipe(filter((planting) => planting !== undefined))
      .subscribe((planting) => this.data.resource.set(planting));
  }

  protected remove(): void {
    const params = this.data.params();
    if (params === undefined) return;
    this.asking
      .ask({
        title: `Remove ${this.title()}?`,
        text: 'It is taken off the list as if it had never been written down; its seed goes back to the lot.',
        confirm: 'Remove the planting',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() => this.api.call(removePlanting, { params })),
      )
      .subscribe({
        next: () => {
          this.notices.say(`${this.title()} removed`);
          void this.router.navigate(['/plantings']);
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  protected addPhoto({ file, caption }: { readonly file: File; readonly caption: string }): void {
    const params = this.data.params();
    if (params === undefined) return;
    this.sender.send(
      file,
      (form) => this.api.upload(addPlantingPhoto, { params, query: { caption }, form }),
      (photo) =>
        this.data.resource.update(
          (planting) => planting && { ...planting, photos: [photo, ...planting.photos] },
        ),
    );
  }

  protected removePhoto(photoId: string): void {
    this.kept
      .remove(photoId, (question) => this.asking.ask(question))
      .subscribe(() =>
        this.data.resource.update(
          (planting) =>
            planting && { ...planting, photos: planting.photos.filter(({ id }) => id !== photoId) },
        ),
      );
  }
}
