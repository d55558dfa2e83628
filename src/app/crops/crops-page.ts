import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';
import { cropGroups } from '@shared/growing/crops/crop';
import { RoomCrops } from '../core/room-crops';
import { matchingCrops } from '../ui/crop-picker/matching-crops';
import { plantLook } from '../ui/plants/crop-look';
import { PlantDrawing } from '../ui/plants/plant-drawing';
import { EmptyState } from '../ui/states/empty-state';
import { ErrorState } from '../ui/states/error-state';
import { LoadingLines } from '../ui/states/loading-lines';
import { eatenText, groupNames } from './crop-words';

/** Every crop of the library and of the room, to be looked through. */
@Component({
  selector: 'app-crops-page',
  templateUrl: './crops-page.html',
  styleUrl: './crops-page.scss',
  imports: [
    EmptyState,
    ErrorState,
    LoadingLines,
    MatButton,
    MatFormFieldModule,
    MatInput,
    MatSelectModule,
    PlantDrawing,
    RouterLink,
  ],
  providers: [RoomCrops],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CropsPage {
  /** From the address: words that a crop must have. */
  readonly find = input<string>();
  /** From the address: the only group that is shown. */
  readonly group = input<string>();
  /** From the address: "own" shows the room's own alone. */
  readonly whose = input<string>();

  private readonly router = inject(Router);
  protected readonly data = inject(RoomCrops);

  protected readonly kinds = cropGroups.map((group) => ({ group, name: groupNames[group] }));
  protected readonly showsOwn = computed(() => this.whose() === 'own');

  private readonly found = computed(() => {
    const all = this.data.all();
    if (all === null) return null;
    const group = this.group();
    return matchingCrops(all, this.find() ?? '').filter(
      (crop) => (group === undefined || crop.group === group) && (crop.isOwn || !this.showsOwn()),
    );
  });
  /** Shelves of the library with what was found on them; null until known. */
  protected readonly groups = computed(() => {
    const found = this.found();
    if (found === null) return null;
    return cropGroups
      .map((group) => ({
        title: groupNames[group],
        crops: found
          .filter((crop) => crop.group === group)
          .map((crop) => ({
            ...crop,
            eaten: eatenText(crop),
            look: plantLook({ crop: crop.name, habit: crop.habit, stage: 'growingOn' }),
          })),
      }))
      .filter(({ crops }) => crops.length > 0);
  });
  protected readonly count = computed(() => {
    const count = this.found()?.length ?? 0;
    return count === 1 ? '1 crop found' : `${count} crops found`;
  });

  protected change(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }
}
