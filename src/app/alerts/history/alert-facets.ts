import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { kindNames } from '@shared/alerts/kind-names';
import type { AlertCounts } from '@shared/contracts/alerts';
import { sayMonth } from '@shared/format/room-time';
import type { HistoryFilter } from './alert-history';

interface Facet {
  readonly title: string;
  readonly choices: readonly {
    readonly words: string;
    readonly count: number;
    /** Of the largest of its list, 0–1. */
    readonly share: number;
    readonly isChosen: boolean;
    readonly filter: HistoryFilter;
  }[];
}

/** How many alerts there were by shelf, kind and month; each line narrows the list to itself, and widens it again. */
@Component({
  selector: 'app-alert-facets',
  templateUrl: './alert-facets.html',
  styleUrl: './alert-facets.scss',
  imports: [MatIcon],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertFacets {
  readonly counts = input.required<AlertCounts>();
  readonly filter = input.required<HistoryFilter>();
  /** The filter as it is to be from now on. */
  readonly chosen = output<HistoryFilter>();

  /** On a phone the lists would push the alerts off the screen. */
  protected readonly isWide = matchMedia('(width >= 960px)').matches;

  protected readonly facets = computed<Facet[]>(() => {
    const { byMonth, byShelf, byKind } = this.counts();
    return [
      this.facet(
        'Month',
        byMonth.map(({ month, count }) => ({ words: sayMonth(month), count, part: { month } })),
      ),
      this.facet(
        'Shelf',
        byShelf.map(({ shelfId, shelfLabel, count }) => ({ words: shelfLabel, count, part: { shelfId } })),
      ),
      this.facet(
        'Kind',
        byKind.map(({ kind, count }) => ({ words: kindNames[kind], count, part: { kind } })),
      ),
    ];
  });
  /** What is filtered by, in words: "A3 · November 2026". */
  protected readonly summary = computed(() => {
    const chosen = this.facets().flatMap(({ choices }) => choices.filter(({ isChosen }) => isChosen));
    return chosen.map(({ words }) => words).join(' · ');
  });
  protected readonly isFiltered = computed(() =>
    Object.values(this.filter()).some((part) => part !== undefined),
  );

  private facet(
    title: string,
    counted: readonly { words: string; count: number; part: HistoryFilter }[],
  ): Facet {
    const filter = this.filter();
    const most = Math.max(1, ...counted.map(({ count }) => count));
    const choices = counted.map(({ words, count, part }) => {
      const entries = Object.entries(part) as [keyof HistoryFilter, string][];
      const isChosen = entries.every(([name, value]) => filter[name] === value);
      const without = Object.fromEntries(entries.map(([name]) => [name, undefined]));
      return {
        words,
        count,
        share: count / most,
        isChosen,
        filter: { ...filter, ...(isChosen ? without : part) },
      };
    });
    return { title, choices };
  }
}
