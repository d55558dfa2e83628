import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { formatShortDay } from '@shared/format/room-time';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { Chart } from '../../ui/chart/chart';
import type { ChartLine } from '../../ui/chart/chart-data';
import { Explained } from '../../ui/explained/explained';
import { NoteLine } from '../../ui/note-line/note-line';
import { LoadingLines } from '../../ui/states/loading-lines';
import { failureText } from '../../core/failure-text';
import { ErrorState } from '../../ui/states/error-state';
import { PlantingData } from '../planting/planting-data';
import { plantingTitle } from '../words/planting-facts';
import { forecastBasis, forecastWords, germinationFacts, verdictWords } from './germination-words';

/** How a sowing comes up: when to look for the first, its curve, and the figures of it. */
@Component({
  selector: 'app-germination-card',
  templateUrl: './germination-card.html',
  styleUrl: './germination-card.scss',
  imports: [Chart, ErrorState, Explained, LoadingLines, NoteLine],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class GerminationCard {
  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);
  protected readonly data = inject(PlantingData);

  protected readonly zone = this.session.timeZone;
  protected readonly germination = this.data.germination;
  protected readonly failure = computed(() => {
    const error = this.data.germinationResource.error();
    return error === undefined ? null : failureText(error);
  });
  protected readonly facts = computed(() => {
    const germination = this.germination();
    return germination === null ? [] : germinationFacts(germination);
  });
  protected readonly verdict = computed(() => {
    const germination = this.germination();
    return germination === null ? [] : verdictWords(germination);
  });
  protected readonly forecast = computed(() => {
    const forecast = this.germination()?.forecast ?? null;
    if (forecast === null) return null;
    const day = (at: string): string => formatShortDay(at, this.zone());
    return {
      isLate: forecast.isLate,
      text: forecastWords(forecast, day),
      basis:
        forecast.earliest === null && forecast.latest === null
          ? ''
          : forecastBasis(
              forecast,
              forecast.outlookC === null ? null : this.format.value('airTemperature', forecast.outlookC),
            ),
      causes: forecast.causes,
    };
  });

  protected readonly title = computed(() => {
    const planting = this.data.planting();
    return planting === null ? 'Germination' : `Germination, ${plantingTitle(planting)}`;
  });
  /** From nothing at sowing over every look. */
  protected readonly lines = computed<ChartLine[]>(() => {
    const [planting, germination] = [this.data.planting(), this.germination()];
    if (planting === null || germination === null || germination.curve.length === 0) return [];
    const looks = germination.curve.map(({ at, percent }) => [Date.parse(at), percent] as const);
    const points = [[Date.parse(planting.startedAt), 0] as const, ...looks];
    return [
      {
        name: 'Up',
        unit: '%',
        decimals: 0,
        points: points.map(([at, percent]) => [at, percent, percent, percent]),
      },
    ];
  });
}
