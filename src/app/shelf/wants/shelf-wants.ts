import type { ComponentType } from '@angular/cdk/portal';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import type { Quantity } from '@shared/climate/quantity';
import { setHeatMat, type WantedRange } from '@shared/contracts/rooms';
import { ApiClient } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { CautionLine } from '../../ui/caution-line/caution-line';
import { ShelfData } from '../shelf-data';
import { chartedQuantities, quantityTitle } from '../quantity-title';
import { LampHoursDialog, type LampHoursSubject } from './lamp-hours-dialog';
import { WantedLightDialog, type WantedLightSubject } from './wanted-light-dialog';
import { WantedRangeDialog, type WantedRangeSubject } from './wanted-range-dialog';
import { lampWords, lightWords, matWords, quantityIcons, rangeWords } from './wants-words';

/** What the shelf should be: lamp hours, wanted ranges and the heat mat; growers may change them. */
@Component({
  selector: 'app-shelf-wants',
  templateUrl: './shelf-wants.html',
  styleUrl: './shelf-wants.scss',
  imports: [CautionLine, MatButton, MatIcon, MatIconButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShelfWants {
  private readonly api = inject(ApiClient);
  private readonly data = inject(ShelfData);
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  protected readonly icons = quantityIcons;
  protected readonly mayChange = computed(() => this.session.may('grower'));
  protected readonly shelf = computed(() => this.data.detail()?.shelf ?? null);
  protected readonly lamp = computed(() => {
    const shelf = this.shelf();
    return shelf === null ? null : lampWords(shelf);
  });
  protected readonly mat = computed(() => {
    const detail = this.data.detail();
    return detail === null ? null : matWords(detail.shelf, detail.plantings);
  });
  protected readonly ranges = computed(() =>
    (this.data.detail()?.wantedRanges ?? []).map((range) => ({
      range,
      title: quantityTitle(range.quantity),
      ...rangeWords(range, this.session.temperatureUnit()),
    })),
  );
  /** Null where nothing sees light and nothing wants any. */
  protected readonly light = computed(() => {
    const { quantities = [], wantedLight = null } = this.data.detail() ?? {};
    const isSeen = quantities.includes('ppfd') || quantities.includes('illuminance');
    return wantedLight === null && !isSeen ? null : lightWords(wantedLight);
  });
  private readonly withoutRange = computed<Quantity[]>(() => {
    const { quantities = [], wantedRanges = [] } = this.data.detail() ?? {};
    const set = new Set(wantedRanges.map(({ quantity }) => quantity));
    return chartedQuantities.filter((quantity) => quantities.includes(quantity) && !set.has(quantity));
  });
  protected readonly canAddRange = computed(() => this.mayChange() && this.withoutRange().length > 0);

  protected changeLampHours(): void {
    const [params, shelf] = [this.data.params(), this.shelf()];
    if (params === undefined || shelf === null) return;
    this.open(LampHoursDialog, { params, lampHours: shelf.lampHours } satisfies LampHoursSubject);
  }

  /** @param range - Null to set one for a quantity that has none. */
  protected changeRange(range: WantedRange | null): void {
    const params = this.data.params();
    if (params === undefined) return;
    const quantities = range === null ? this.withoutRange() : [range.quantity];
    this.open(WantedRangeDialog, { params, range, quantities } satisfies WantedRangeSubject);
  }

  protected changeLight(): void {
    const [params, detail] = [this.data.params(), this.data.detail()];
    if (params === undefined || detail === null) return;
    this.open(WantedLightDialog, { params, light: detail.wantedLight } satisfies WantedLightSubject);
  }

  protected switchMat(isOn: boolean): void {
    const params = this.data.params();
    if (params === undefined) return;
    this.api.call(setHeatMat, { params, body: { isOn } }).subscribe({
      next: () => {
        this.data.detailResource.reload();
        this.notices.say(isOn ? 'Noted: the heat mat is on' : 'Noted: the heat mat is off');
      },
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }

  private open(dialog: ComponentType<unknown>, data: unknown): void {
    this.dialog
      .open<unknown, unknown, boolean>(dialog, { data, maxWidth: '640px' })
      .afterClosed()
      .subscribe((isSaved) => {
        if (isSaved === true) this.data.detailResource.reload();
      });
  }
}
