import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { Router } from '@angular/router';
import { listRacks } from '@shared/contracts/rooms';
import { map } from 'rxjs';
import { AlertFeed } from '../core/alert-feed';
import { AlertInbox } from '../core/alert-inbox';
import { ApiClient } from '../core/api-client';
import { failureText } from '../core/failure-text';
import { Session } from '../core/session';
import { EmptyState } from '../ui/states/empty-state';
import { ErrorState } from '../ui/states/error-state';
import { LoadingLines } from '../ui/states/loading-lines';
import { AlertCard } from './alert-card/alert-card';
import { AlertHistory } from './alert-history';

/** The alerts of the room: those open now, or all of them with those that are over. */
@Component({
  selector: 'app-alerts-page',
  templateUrl: './alerts-page.html',
  styleUrl: './alerts-page.scss',
  imports: [AlertCard, EmptyState, ErrorState, LoadingLines, MatButton, MatFormFieldModule, MatSelectModule],
  providers: [AlertHistory],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AlertsPage {
  /** From the address: "all" shows those that are over too. */
  readonly show = input<string>();
  /** From the address: the id of the only shelf that is shown. */
  readonly shelf = input<string>();

  private readonly api = inject(ApiClient);
  private readonly feed = inject(AlertFeed);
  private readonly inbox = inject(AlertInbox);
  private readonly router = inject(Router);
  private readonly session = inject(Session);
  protected readonly history = inject(AlertHistory);

  protected readonly showsAll = computed(() => this.show() === 'all');
  /** Those of the chosen shelf, urgent ones first. */
  private readonly openHere = computed(() => {
    const here = this.inbox
      .open()
      ?.filter(({ shelfId }) => this.shelf() === undefined || shelfId === this.shelf());
    if (here === undefined) return null;
    const [urgent, calm] = [true, false].map((isUrgent) =>
      here.filter(({ urgency }) => (urgency === 'goNow') === isUrgent),
    );
    return [...(urgent ?? []), ...(calm ?? [])];
  });
  protected readonly alerts = computed(() => (this.showsAll() ? this.history.alerts() : this.openHere()));
  protected readonly openCount = computed(() => this.inbox.open()?.length ?? 0);
  protected readonly failure = computed(() => {
    const error = this.showsAll() ? this.history.resource.error() : this.feed.failure();
    return error === undefined || error === null ? null : failureText(error);
  });

  private readonly shelfResource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) =>
      this.api
        .call(listRacks, { params })
        .pipe(
          map((racks) => racks.flatMap(({ shelves }) => shelves.map(({ id, label }) => ({ id, label })))),
        ),
  });
  protected readonly shelves = computed(() =>
    this.shelfResource.hasValue() ? this.shelfResource.value() : [],
  );

  constructor() {
    effect(() => {
      this.history.shelfId.set(this.shelf() ?? null);
      this.history.isShown.set(this.showsAll());
    });
  }

  protected showOpen(): void {
    this.changeAddress({ show: null });
  }

  protected showAll(): void {
    this.changeAddress({ show: 'all' });
  }

  protected showShelf(shelf: string | null): void {
    this.changeAddress({ shelf });
  }

  protected retry(): void {
    if (this.showsAll()) this.history.resource.reload();
    else this.feed.refresh();
  }

  private changeAddress(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge' });
  }
}
