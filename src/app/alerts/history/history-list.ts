import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
  output,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { AlertCounts } from '@shared/contracts/alerts';
import { failureText } from '../../core/failure-text';
import { EmptyState } from '../../ui/states/empty-state';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { AlertCard } from '../alert-card/alert-card';
import { AlertFacets } from './alert-facets';
import { AlertHistory, type HistoryFilter } from './alert-history';

/** Every alert of the room under a filter, with how many there were. */
@Component({
  selector: 'app-history-list',
  templateUrl: './history-list.html',
  styleUrl: './history-list.scss',
  imports: [AlertCard, AlertFacets, EmptyState, ErrorState, LoadingLines, MatButton],
  providers: [AlertHistory],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HistoryList {
  readonly filter = input.required<HistoryFilter>();
  readonly filterChosen = output<HistoryFilter>();

  protected readonly history = inject(AlertHistory);

  /** Those before stand until the next ones are there, so that what was pressed stays under the finger. */
  protected readonly counts = linkedSignal<AlertCounts | undefined, AlertCounts | null>({
    source: () => (this.history.countResource.hasValue() ? this.history.countResource.value() : undefined),
    computation: (counts, before) => counts ?? before?.value ?? null,
  });
  protected readonly total = computed(() => {
    const total = this.counts()?.total;
    if (total === undefined) return '';
    return total === 1 ? '1 alert' : `${total} alerts`;
  });
  protected readonly isFiltered = computed(() =>
    Object.values(this.filter()).some((part) => part !== undefined),
  );
  protected readonly failure = computed(() => {
    const error = this.history.resource.error();
    return error === undefined ? null : failureText(error);
  });

  constructor() {
    effect(() => this.history.filter.set(this.filter()));
  }
}
