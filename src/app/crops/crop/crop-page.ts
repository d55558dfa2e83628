import type { ComponentType } from '@angular/cdk/portal';
import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import { Router, RouterLink } from '@angular/router';
import { copyCrop, retireCrop, type Crop } from '@shared/contracts/crops';
import { filter, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { CautionLine } from '../../ui/caution-line/caution-line';
import { Asking } from '../../ui/dialogs/asking';
import { plantLook } from '../../ui/plants/crop-look';
import { PlantDrawing } from '../../ui/plants/plant-drawing';
import { sourceWords } from '../../ui/sourced/source-words';
import { Sourced } from '../../ui/sourced/sourced';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { groupNames } from '../crop-words';
import type { CropSlot } from '../figure/crop-slot';
import { FieldsDialog } from '../figure/fields-dialog';
import { FigureDialog } from '../figure/figure-dialog';
import type { FigureSubject } from '../figure/figure-saving';
import { figuresOf } from '../figure/figure-slot';
import { eatenSlot, toxicitySlot } from '../figure/plant-slots';
import { TableDialog } from '../figure/table-dialog';
import { emergenceSlot, seedlingsSlot } from '../figure/table-slot';
import { CropData } from './crop-data';
import { climateGroups, emergenceTable, growthFacts, seedFacts, sowingFacts } from './crop-facts';
import { FactList } from './fact-list';
import { NameDialog, type NameSubject } from './name-dialog';
import { VarietiesCard } from './varieties-card';

/** How each kind of figure is changed. */
const dialogs: Readonly<Record<CropSlot['kind'], ComponentType<unknown>>> = {
  range: FigureDialog,
  fields: FieldsDialog,
  table: TableDialog,
};

/** One crop with every figure and who says so; a room's own can be changed. */
@Component({
  selector: 'app-crop-page',
  templateUrl: './crop-page.html',
  styleUrl: './crop-page.scss',
  imports: [
    CautionLine,
    ErrorState,
    FactList,
    LoadingLines,
    MatButton,
    MatIcon,
    MatIconButton,
    PlantDrawing,
    RouterLink,
    Sourced,
    VarietiesCard,
  ],
  providers: [CropData],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CropPage {
  /** From the path. */
  readonly cropId = input.required<string>();

  private readonly api = inject(ApiClient);
  private readonly asking = inject(Asking);
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  protected readonly data = inject(CropData);

  protected readonly groupNames = groupNames;
  protected readonly look = computed(() => {
    const crop = this.data.crop();
    return plantLook({ crop: crop?.name ?? '', habit: crop?.habit ?? 'leafy', stage: 'growingOn' });
  });
  protected readonly seed = this.facts((crop, unit) => seedFacts(crop, unit));
  protected readonly sowing = this.facts((crop) => sowingFacts(crop));
  protected readonly growth = this.facts((crop, unit) => growthFacts(crop, unit));
  protected readonly climate = this.facts((crop, unit) => climateGroups(crop, unit));
  protected readonly emergence = this.facts((crop, unit) => emergenceTable(crop, unit));
  protected readonly emergenceSources = this.facts(({ seed }) => [
    ...new Set(
      [seed?.emergence, seed?.normalSeedlings].flatMap((figure) =>
        figure === null || figure === undefined ? [] : [sourceWords(figure.source)],
      ),
    ),
  ]);

  /** Where the tables by warmth are changed. */
  protected readonly tableSlots = this.facts((crop) =>
    [emergenceSlot(crop), seedlingsSlot(crop)].filter((slot) => slot !== null),
  );
  protected readonly safetySlots = computed(() => {
    const crop = this.data.crop();
    return crop && { eaten: eatenSlot(crop), toxicity: toxicitySlot(crop) };
  });

  constructor() {
    effect(() => this.data.cropId.set(this.cropId()));
  }

  protected change(slot: CropSlot): void {
    const [params, crop] = [this.data.params(), this.data.crop()];
    if (params === undefined || crop === null) return;
    this.dialog
      .open<unknown, FigureSubject, boolean>(dialogs[slot.kind], {
        data: { cropName: crop.name, slot, save: (figures) => this.data.save(params, figures) },
        maxWidth: '520px',
      })
      .afterClosed()
      .subscribe((isSaved) => {
        if (isSaved === true) this.notices.say('Saved for this room');
      });
  }

  protected copy(): void {
    const [params, crop] = [this.data.params(), this.data.crop()];
    if (params === undefined || crop === null) return;
    const { roomId, cropId } = params;
    this.askName({
      title: `Copy ${crop.name}`,
      text: 'The copy belongs to this room. Its figures can be changed; shelves, sowing dates and forecasts go by them.',
      name: `${crop.name}, ours`,
      deed: 'Copy it',
      save: (name) => this.api.call(copyCrop, { params: { roomId }, body: { copyOf: cropId, name } }),
    }).subscribe((copy) => {
      this.notices.say(`${copy.name} is this room’s own`);
      void this.router.navigate(['/crops', copy.id]);
    });
  }

  protected rename(): void {
    const [params, crop] = [this.data.params(), this.data.crop()];
    if (params === undefined || crop === null) return;
    this.askName({
      title: `Rename ${crop.name}`,
      text: 'What grows of it keeps the name that it was written down with.',
      name: crop.name,
      deed: 'Rename it',
      save: (name) => this.data.save(params, { ...figuresOf(crop), name }),
    }).subscribe(({ name }) => this.notices.say(`Renamed to ${name}`));
  }

  protected retire(): void {
    const [params, crop] = [this.data.params(), this.data.crop()];
    if (params === undefined || crop === null) return;
    this.asking
      .ask({
        title: `Take ${crop.name} off the list?`,
        text: 'It can’t be chosen any more. What was grown of it keeps its figures.',
        confirm: 'Take it off',
        isDestructive: true,
      })
      .pipe(
        filter(Boolean),
        switchMap(() => this.api.call(retireCrop, { params })),
      )
      .subscribe({
        next: () => {
          this.notices.say(`${crop.name} taken off the list`);
          void this.router.navigate(['/crops']);
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }

  private askName(subject: NameSubject<Crop>) {
    return this.dialog
      .open<NameDialog, NameSubject<Crop>, Crop>(NameDialog, { data: subject, maxWidth: '460px' })
      .afterClosed()
      .pipe(filter((crop) => crop !== undefined));
  }

  private facts<T>(of: (crop: Crop, unit: '°C' | '°F') => readonly T[]) {
    return computed(() => {
      const crop = this.data.crop();
      return crop === null ? [] : of(crop, this.session.temperatureUnit());
    });
  }
}
