import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource, toObservable, toSignal } from '@angular/core/rxjs-interop';
import type { Quantity } from '@shared/climate/quantity';
import { tryWantedRange } from '@shared/contracts/rooms';
import { getSeries, getShelfReport } from '@shared/contracts/series';
import { shownRange } from '@shared/format/quantities';
import { catchError, combineLatest, debounceTime, map, of, startWith, switchMap } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { RoomClock } from '../../core/room-clock';
import { Session } from '../../core/session';
import { shownLines } from '../../core/shown-series';
import { Chart } from '../../ui/chart/chart';
import { quantityTitle } from '../quantity-title';
import { trialWords } from './trial-words';
import { typedBand } from './typed-band';
import type { SavedRange } from './wanted-range-form';

const weekMs = 7 * 86_400_000;
/** Long enough for the next digit. */
const typingMs = 400;

/** A range that is being typed over the readings of the last week, and how often it would have opened an alert. */
@Component({
  selector: 'app-range-preview',
  template: `
    @if (lines(); as lines) {
      <app-chart
        [title]="title()"
        [lines]="lines"
        [wanted]="band()"
        [lamps]="lamps()"
        [nights]="openings()"
        [span]="span"
        [zone]="zone()"
      >
        <p>The last seven days. Green is what you type; shaded is when an alert would have been open.</p>
      </app-chart>
    }
    <p class="words" role="status">{{ words() }}</p>
  `,
  styles: `
    :host {
      display: block;
      min-width: 0;
      --plot-height: 150px;
    }

    p {
      margin: 0;
      color: var(--ink-2);
      font-size: 0.84375rem;
      text-wrap: pretty;
    }

    .words {
      min-height: 2.9em;
      margin-top: 6px;
      color: var(--ink);
      font-size: 0.9375rem;
      font-weight: 600;
    }
  `,
  imports: [Chart],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RangePreview {
  readonly params = input.required<{ readonly roomId: string; readonly shelfId: string }>();
  readonly quantity = input.required<Quantity>();
  /** As it would be saved; null while it can't be. */
  readonly range = input.required<SavedRange | null>();

  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly now = inject(RoomClock).now();

  protected readonly zone = this.session.timeZone;
  protected readonly span = { from: this.now - weekMs, to: this.now };
  private readonly query = {
    from: new Date(this.span.from).toISOString(),
    to: new Date(this.span.to).toISOString(),
  };

  private readonly series = rxResource({
    params: () => ({ ...this.params(), quantity: this.quantity() }),
    stream: ({ params }) => this.api.call(getSeries, { params, query: this.query }),
  });
  private readonly report = rxResource({
    params: () => this.params(),
    stream: ({ params }) => this.api.call(getShelfReport, { params, query: this.query }),
  });
  /** Asked once typing rests; what was known before stands until then. */
  private readonly trial = toSignal(
    combineLatest([toObservable(this.quantity), toObservable(this.range)]).pipe(
      debounceTime(typingMs),
      switchMap(([quantity, range]) => {
        if (range === null) return of({ failure: null, trial: null });
        const { reason: _, ...body } = range;
        return this.api.call(tryWantedRange, { params: { ...this.params(), quantity }, body }).pipe(
          map((trial) => ({ failure: null, trial })),
          catchError((error: unknown) => of({ failure: failureText(error), trial: null })),
        );
      }),
      startWith(null),
    ),
    { requireSync: true },
  );

  protected readonly title = computed(() => `${quantityTitle(this.quantity())}, the last seven days`);
  protected readonly lines = computed(() =>
    this.series.hasValue() ? shownLines(this.series.value(), [], this.session.temperatureUnit()) : null,
  );
  private readonly plannedLamps = computed(() =>
    this.report.hasValue() ? this.report.value().plannedLamps : [],
  );
  protected readonly lamps = computed(() =>
    this.plannedLamps().map(({ from, to }) => ({ from: Date.parse(from), to: Date.parse(to) })),
  );
  protected readonly band = computed(() => {
    const range = this.range();
    if (range === null || !this.report.hasValue()) return [];
    const [lampsOn, lampsOff] = [range.lampsOn, range.lampsOff].map((limits) =>
      shownRange(this.quantity(), limits, this.session.temperatureUnit()),
    ) as [SavedRange['lampsOn'], SavedRange['lampsOff']];
    return typedBand({ lampsOn, lampsOff }, this.plannedLamps(), this.span);
  });
  protected readonly openings = computed(() =>
    (this.trial()?.trial?.episodes ?? []).map(({ beganAt, endedAt }) => ({
      from: Date.parse(beganAt),
      to: endedAt === null ? this.span.to : Date.parse(endedAt),
    })),
  );
  protected readonly words = computed(() => {
    if (this.range() === null)
      return 'Give a range that can be kept, and see how often it would have opened an alert.';
    const asked = this.trial();
    if (asked === null) return 'Trying it on the last days…';
    if (asked.failure !== null) return asked.failure;
    return asked.trial === null ? 'Trying it on the last days…' : trialWords(asked.trial);
  });
}
