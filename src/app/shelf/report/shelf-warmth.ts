import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { getDegreeDays } from '@shared/contracts/series';
import {
  formatNumber,
  formatShare,
  formatValue,
  shownTemperature,
  shownTemperatureDifference,
  typedTemperatureC,
} from '@shared/format/numbers';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { Session } from '../../core/session';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { keptValue } from '../kept-value';
import { ShelfData } from '../shelf-data';
import { dayWords } from '../span/shelf-span';

/** A series that warmth is summed from. */
type WarmthQuantity = 'airTemperature' | 'rootZoneTemperature';

/** What a sum above a base can be asked for [°C], as the server takes it. */
const baseLimitsC = { low: -10, high: 40 } as const;

/** Degree days of the span above a base that the reader may change. */
@Component({
  selector: 'app-shelf-warmth',
  templateUrl: './shelf-warmth.html',
  styleUrl: './report.scss',
  imports: [ErrorState, LoadingLines, MatFormFieldModule, MatInput, MatSelectModule, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShelfWarmth {
  /** Warmth counts from here on [°C]. */
  readonly baseC = input.required<number>();
  /** A base that the reader typed [°C]. */
  readonly baseChosen = output<number>();

  private readonly api = inject(ApiClient);
  private readonly data = inject(ShelfData);
  private readonly session = inject(Session);

  protected readonly unit = this.session.temperatureUnit;
  protected readonly quantities = computed<WarmthQuantity[]>(() =>
    (['airTemperature', 'rootZoneTemperature'] as const).filter(
      (quantity) => this.data.detail()?.quantities.includes(quantity) === true,
    ),
  );
  protected readonly chosenQuantity = signal<WarmthQuantity | null>(null);
  protected readonly quantity = computed(() => this.chosenQuantity() ?? this.quantities()[0] ?? null);
  protected readonly baseField = new FormControl<number | null>(null);

  protected readonly resource = rxResource({
    params: () => {
      const [params, quantity] = [this.data.params(), this.quantity()];
      if (params === undefined || quantity === null) return undefined;
      return { ...params, query: { ...this.data.query(), quantity, baseC: this.baseC() } };
    },
    stream: ({ params: { query, ...params } }) => this.api.call(getDegreeDays, { params, query }),
  });
  private readonly warmth = keptValue(this.resource, this.data.subject());
  protected readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  /** "83.4 °C·d above 10 °C" */
  protected readonly sum = computed(() => {
    const warmth = this.warmth();
    if (warmth === null) return null;
    const base = shownTemperature(warmth.baseC, this.unit());
    const decimals = Number.isInteger(base) ? 0 : 1;
    const sum = shownTemperatureDifference(warmth.degreeDaysCD, this.unit());
    return `${formatValue(sum, `${this.unit()}·d`, 1)} above ${formatValue(base, this.unit(), decimals)}`;
  });
  protected readonly held = computed(() => {
    const warmth = this.warmth();
    return warmth === null ? null : formatShare(warmth.coverage);
  });
  protected readonly rows = computed(() =>
    [...(this.warmth()?.perDay ?? [])].reverse().map(({ day, degreeDaysCD, coverage }) => ({
      day,
      when: dayWords(day),
      sum: formatNumber(shownTemperatureDifference(degreeDaysCD, this.unit()), 1),
      held: formatShare(coverage),
    })),
  );

  constructor() {
    effect(() =>
      this.baseField.setValue(Number(shownTemperature(this.baseC(), this.unit()).toFixed(1)), {
        emitEvent: false,
      }),
    );
  }

  protected chooseBase(): void {
    const typed = this.baseField.value;
    const baseC = typed === null ? NaN : typedTemperatureC(typed, this.unit());
    const isUsable = baseC >= baseLimitsC.low && baseC <= baseLimitsC.high;
    this.baseField.setErrors(isUsable ? null : { outside: true });
    if (isUsable) this.baseChosen.emit(Number(baseC.toFixed(2)));
  }

  protected readonly baseHint = computed(() => {
    const [low, high] = [baseLimitsC.low, baseLimitsC.high].map((limit) =>
      formatNumber(shownTemperature(limit, this.unit()), 0),
    );
    return `From ${low} to ${high} ${this.unit()}.`;
  });
}
