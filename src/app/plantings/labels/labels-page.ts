import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  linkedSignal,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { DOCUMENT } from '@angular/common';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import { listPlantings } from '@shared/contracts/plantings';
import { formatDayAndYear } from '@shared/format/room-time';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Session } from '../../core/session';
import { NoteLine } from '../../ui/note-line/note-line';
import { QrCode } from '../../ui/qr-code/qr-code';
import { EmptyState } from '../../ui/states/empty-state';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { countWords, placeWords, plantingTitle } from '../words/planting-facts';
import { labelCount, labelSheet, mostLabels, withCount, type LabelCounts } from './label-sheet';

/** Sizes of label, as they are cut. */
const sizes = [
  { name: 'Stick', words: '80 × 18 mm, for a plant stick' },
  { name: 'Pot', words: '60 × 34 mm, for a pot or a flat' },
] as const;
type SizeName = (typeof sizes)[number]['name'];

/** Labels to print and cut: which plantings, and how many of each. */
@Component({
  selector: 'app-labels-page',
  templateUrl: './labels-page.html',
  styleUrl: './labels-page.scss',
  imports: [EmptyState, ErrorState, LoadingLines, MatButton, MatIcon, NoteLine, QrCode, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LabelsPage {
  /** From the address: the only planting to begin with. */
  readonly only = input<string>();
  /** From the address: the only shelf whose plantings are offered. */
  readonly shelf = input<string>();

  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly window = inject(DOCUMENT).defaultView;

  protected readonly most = mostLabels;
  protected readonly sizes = sizes;
  protected readonly size = signal<SizeName>('Stick');

  protected readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId, shelfId: this.shelf() };
    },
    stream: ({ params: { roomId, shelfId } }) =>
      this.api.call(listPlantings, { params: { roomId }, query: { shelfId, limit: 200 } }),
  });
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });
  private readonly plantings = computed(() =>
    this.resource.hasValue() ? this.resource.value().plantings : null,
  );
  private readonly counts = linkedSignal<LabelCounts>(() => {
    const only = this.only();
    return only === undefined ? {} : { [only]: 1 };
  });
  protected readonly choices = computed(
    () =>
      this.plantings()?.map((planting) => ({
        id: planting.id,
        title: plantingTitle(planting),
        facts: `${countWords(planting)} · ${placeWords(planting)}`,
        count: labelCount(this.counts(), planting.id),
      })) ?? null,
  );
  protected readonly labels = computed(() =>
    labelSheet(this.plantings() ?? [], this.counts(), (day) =>
      formatDayAndYear(`${day}T00:00:00Z`, 'UTC'),
    ).map((label) => ({ ...label, address: this.addressOf(label.plantingId) })),
  );

  /** Whether the squares would lead a phone to itself, as the page was opened on the server's own machine. */
  protected readonly leadsNowhere = /^(localhost|127\.|\[::1\])/.test(this.window?.location.hostname ?? '');

  protected setCount(plantingId: string, count: number): void {
    this.counts.update((counts) => withCount(counts, plantingId, count));
  }

  protected setAll(count: number): void {
    this.counts.set(Object.fromEntries((this.plantings() ?? []).map(({ id }) => [id, count])));
  }

  protected print(): void {
    this.window?.print();
  }

  private addressOf(plantingId: string): string {
    return `${this.window?.location.origin ?? ''}/plantings/${plantingId}`;
  }
}
