import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { changeCrop, getCrop, listVarieties, type Crop, type CropFigures } from '@shared/contracts/crops';
import { tap, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Session } from '../../core/session';

/** The crop that a page is about, and the room's varieties of it. One for each page. */
@Injectable()
export class CropData {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);

  /** Which crop; null until the address is known. */
  readonly cropId = signal<string | null>(null);
  /** Parameters of every call about it; undefined until it is known which. */
  readonly params = computed(
    () => {
      const [roomId, cropId] = [this.session.roomId(), this.cropId()];
      return roomId === null || cropId === null ? undefined : { roomId, cropId };
    },
    { equal: (a, b) => a?.roomId === b?.roomId && a?.cropId === b?.cropId },
  );
  readonly resource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getCrop, { params }),
  });
  /** Null until it is there. */
  readonly crop = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  /** Why it is not there; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  readonly varietyResource = rxResource({
    params: this.params,
    stream: ({ params: { roomId } }) => this.api.call(listVarieties, { params: { roomId } }),
  });
  /** Varieties of this crop; null until known. */
  readonly varieties = computed(() =>
    this.varietyResource.hasValue()
      ? this.varietyResource.value().filter(({ cropId }) => cropId === this.cropId())
      : null,
  );

  readonly mayChange = computed(() => this.session.may('grower'));
  /** Whether its figures can be changed here: those of the library are copied first. */
  readonly isChangeable = computed(() => this.mayChange() && this.crop()?.isOwn === true);

  /** Saves figures; the page then shows them. */
  save(params: { roomId: string; cropId: string }, body: CropFigures): Observable<Crop> {
    return this.api.call(changeCrop, { params, body }).pipe(tap((crop) => this.resource.set(crop)));
  }
}
