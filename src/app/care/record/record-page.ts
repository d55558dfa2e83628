import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { Router } from '@angular/router';
import { Session } from '../../core/session';
import { ComplianceCard } from './compliance-card';
import { DryingCard } from './drying-card';
import { RecordData } from './record-data';
import { recordFilterOf, type RecordFilter } from './record-filter';
import { RecordFilters } from './record-filters';
import { RecordList } from './record-list';
import { YieldsCard } from './yields-card';

/** What was done, and what it came to. */
@Component({
  selector: 'app-record-page',
  template: `
    <header>
      <div>
        <h1 tabindex="-1">Record</h1>
        <p>What was done, where, by whom, and what it brought.</p>
      </div>
      @if (csvLink(); as link) {
        <a matButton="outlined" download [href]="link">
          <mat-icon aria-hidden="true">download</mat-icon>Save as CSV
        </a>
      }
    </header>
    <app-record-filters [filter]="filter()" (chosen)="choose($event)" />
    <div class="columns">
      <div>
        <h2>History</h2>
        <app-record-list (allWanted)="choose({})" />
      </div>
      <div>
        @if (filter().planting; as plantingId) {
          <app-drying-card [plantingId]="plantingId" />
        }
        <app-compliance-card />
        <app-yields-card />
      </div>
    </div>
  `,
  styleUrl: './record-page.scss',
  imports: [ComplianceCard, DryingCard, MatButton, MatIcon, RecordFilters, RecordList, YieldsCard],
  providers: [RecordData],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RecordPage {
  /** From the address; see `RecordFilter`. */
  readonly planting = input<string>();
  readonly shelf = input<string>();
  readonly person = input<string>();
  readonly kind = input<string>();
  readonly from = input<string>();
  readonly to = input<string>();

  private readonly data = inject(RecordData);
  private readonly router = inject(Router);
  private readonly session = inject(Session);

  protected readonly filter = computed(
    () =>
      recordFilterOf({
        planting: this.planting(),
        shelf: this.shelf(),
        person: this.person(),
        kind: this.kind(),
        from: this.from(),
        to: this.to(),
      }),
    { equal: (one, other) => JSON.stringify(one) === JSON.stringify(other) },
  );
  protected readonly csvLink = computed(() => (this.session.may('grower') ? this.data.csvLink() : null));

  constructor() {
    effect(() => this.data.filter.set(this.filter()));
  }

  protected choose(filter: RecordFilter): void {
    void this.router.navigate([], { queryParams: filter, replaceUrl: true });
  }
}
