import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import {
  downloadCareRecord,
  getCareCompliance,
  getCareYields,
  listCareRecord,
} from '@shared/contracts/care-record';
import { auditTime, finalize, merge } from 'rxjs';
import { ApiClient, apiPath } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { LiveConnection } from '../../core/live-connection';
import { Notices } from '../../core/notices';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { recordQuery, summedSpan, type RecordFilter } from './record-filter';

const pageSize = 20;
/** A morning's ticks come one after another. */
const followAfterMs = 2_000;

/** What was done under a filter, a page at a time, and what it sums up to. One for each page. */
@Injectable()
export class RecordData {
  private readonly api = inject(ApiClient);
  private readonly format = inject(ReaderFormat);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  /** Null until the address is known; nothing is fetched before. */
  readonly filter = signal<RecordFilter | null>(null);
  readonly isLoadingMore = signal(false);

  private readonly request = computed(() => {
    const [roomId, filter] = [this.session.roomId(), this.filter()];
    return roomId === null || filter === null
      ? undefined
      : { params: { roomId }, query: recordQuery(filter) };
  });
  readonly resource = rxResource({
    params: this.request,
    stream: ({ params: { params, query } }) =>
      this.api.call(listCareRecord, { params, query: { ...query, limit: pageSize } }),
  });
  /** Null until the first page is there. */
  readonly tasks = computed(() => (this.resource.hasValue() ? this.resource.value().tasks : null));
  readonly hasMore = computed(() => this.resource.hasValue() && this.resource.value().nextCursor !== null);
  /** Why it is not there; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  /** The days that are summed up; null while they are the wrong way round. */
  readonly span = computed(() => summedSpan(this.filter() ?? {}, this.format.today()));
  private readonly summed = computed(() => {
    const [roomId, span] = [this.session.roomId(), this.span()];
    return roomId === null || span === null || this.filter() === null
      ? undefined
      : { params: { roomId }, query: span };
  });
  readonly complianceResource = rxResource({
    params: this.summed,
    stream: ({ params }) => this.api.call(getCareCompliance, params),
  });
  readonly yieldsResource = rxResource({
    params: this.summed,
    stream: ({ params }) => this.api.call(getCareYields, params),
  });

  /** Address of the record under this filter as a file; null until it is known. */
  readonly csvLink = computed(() => {
    const request = this.request();
    if (request === undefined) return null;
    const given = Object.entries(request.query).filter(([, value]) => value !== undefined);
    const query = new URLSearchParams(given as [string, string][]).toString();
    return `${apiPath(downloadCareRecord.path, request.params)}${query === '' ? '' : `?${query}`}`;
  });

  constructor() {
    const live = inject(LiveConnection);
    merge(live.on('task:changed'), live.caughtUp)
      .pipe(auditTime(followAfterMs), takeUntilDestroyed())
      .subscribe(() => this.refresh());
  }

  /** Fetches everything anew. */
  refresh(): void {
    this.resource.reload();
    this.complianceResource.reload();
    this.yieldsResource.reload();
  }

  /** Fetches the next page. */
  showMore(): void {
    const request = this.request();
    const cursor = this.resource.hasValue() ? this.resource.value().nextCursor : null;
    if (request === undefined || cursor === null || this.isLoadingMore()) return;
    this.isLoadingMore.set(true);
    this.api
      .call(listCareRecord, { ...request, query: { ...request.query, limit: pageSize, cursor } })
      .pipe(finalize(() => this.isLoadingMore.set(false)))
      .subscribe({
        // Another filter may have been chosen meanwhile; then the page belongs to nothing that is shown.
        next: (page) => {
          if (request !== this.request()) return;
          this.resource.update((held) => ({ ...page, tasks: [...(held?.tasks ?? []), ...page.tasks] }));
        },
        error: (error: unknown) => this.notices.sayFailure(error),
      });
  }
}
