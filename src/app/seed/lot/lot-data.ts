import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { getSeedLot, type SeedLotDetail } from '@shared/contracts/seed';
import { tap, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Session } from '../../core/session';

/** The lot that a page is about. One for each page. */
@Injectable()
export class LotData {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);

  /** Which lot; null until the address is known. */
  readonly lotId = signal<string | null>(null);
  /** Parameters of every call about it; undefined until it is known which. */
  readonly params = computed(
    () => {
      const [roomId, lotId] = [this.session.roomId(), this.lotId()];
      return roomId === null || lotId === null ? undefined : { roomId, lotId };
    },
    { equal: (a, b) => a?.roomId === b?.roomId && a?.lotId === b?.lotId },
  );
  readonly resource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getSeedLot, { params }),
  });
  /** Null until it is there. */
  readonly lot = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  /** Why it is not there; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });
  readonly mayChange = computed(() => this.session.may('grower'));

  /** A call that answers with the lot as it is afterwards, which the page then shows. */
  showing(call: Observable<SeedLotDetail>): Observable<SeedLotDetail> {
    return call.pipe(tap((lot) => this.resource.set(lot)));
  }
}
