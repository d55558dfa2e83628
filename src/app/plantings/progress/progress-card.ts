import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatNumber, formatRange, formatShare, formatValue, noValue } from '@shared/format/numbers';
import { shownTemperature } from '@shared/format/numbers';
import { dayBounds } from '@shared/series/room-days';
import { failureText } from '../../core/failure-text';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Chart } from '../../ui/chart/chart';
import type { ChartLine, ChartPoint, WantedSpan } from '../../ui/chart/chart-data';
import { Explained } from '../../ui/explained/explained';
import { NoteLine } from '../../ui/note-line/note-line';
import { Sourced } from '../../ui/sourced/sourced';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { PlantingData } from '../planting/planting-data';

const dliUnit = 'mol/m² a day';
const hourMs = 3_600_000;

/** Warmth and light that a planting has had, against what its crop needs. */
@Component({
  selector: 'app-progress-card',
  templateUrl: './progress-card.html',
  styleUrl: './progress-card.scss',
  imports: [Chart, ErrorState, Explained, LoadingLines, NoteLine, Sourced],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProgressCard {
  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);
  protected readonly data = inject(PlantingData);

  protected readonly zone = this.session.timeZone;
  protected readonly progress = this.data.progress;
  protected readonly failure = computed(() => {
    const error = this.data.progressResource.error();
    return error === undefined ? null : failureText(error);
  });
  protected readonly warmth = computed(() => {
    const warmth = this.progress()?.degreeDays ?? null;
    if (warmth === null) return null;
    const unit = this.session.temperatureUnit();
    const base = formatValue(shownTemperature(warmth.baseC, unit), unit, 0);
    return {
      sum: formatValue(warmth.sumCD, '°C·d', 0),
      perDay: warmth.perDayCD === null ? noValue : formatValue(warmth.perDayCD, '°C·d a day', 1),
      base: `above ${base}, ${formatShare(warmth.coverage)} of the time measured`,
      source: warmth.source,
    };
  });
  protected readonly transplant = computed(() => {
    const transplant = this.progress()?.transplant ?? null;
    if (transplant === null) return null;
    const { earliest, latest, degreeDaysToEarliest: low, degreeDaysToLatest: high, source } = transplant;
    const still =
      low === null || high === null
        ? ''
        : `${formatNumber(low, 0)} to ${formatValue(high, '°C·d', 0)} from now at the present warmth`;
    const from = this.format.day(earliest);
    const to = this.format.day(latest);
    return { days: from === to ? from : `${from} to ${to}`, still, source };
  });
  protected readonly light = computed(() => {
    const light = this.progress()?.light ?? null;
    if (light === null) return null;
    return {
      wanted: formatRange(light.wanted, dliUnit, 0),
      source: light.source,
      sum: light.sumMolM2 === null ? noValue : formatValue(light.sumMolM2, 'mol/m²', 0),
      shortage:
        light.shortage === null
          ? null
          : {
              text: `Short of light for three days: ${formatNumber(light.shortage.meanMolM2D, 1)} a day, ${formatValue(light.shortage.missingMolM2D, dliUnit, 1)} too little.`,
              causes: light.shortage.causes,
            },
    };
  });
  protected readonly lines = computed<ChartLine[]>(() => {
    const days = this.progress()?.light?.days ?? [];
    const points = days.map(({ day, dliMolM2D }): ChartPoint => [
      this.noonOf(day),
      dliMolM2D,
      dliMolM2D,
      dliMolM2D,
    ]);
    return points.some(([, dli]) => dli !== null)
      ? [{ name: 'Light of the day', unit: dliUnit, decimals: 1, points }]
      : [];
  });
  protected readonly wanted = computed<WantedSpan[]>(() => {
    const light = this.progress()?.light ?? null;
    const [first, last] = [light?.days[0], light?.days.at(-1)];
    if (light === null || first === undefined || last === undefined) return [];
    return [{ from: this.noonOf(first.day), to: this.noonOf(last.day), ...light.wanted }];
  });

  private noonOf(day: string): number {
    return dayBounds(day, this.zone()).start + 12 * hourMs;
  }
}
