import type { EmergenceForecastView, GerminationView, SowingNow } from '@shared/contracts/germination';
import type { Crop } from '@shared/growing/crops/crop';
import type { EmergenceForecast, SourceForecast } from '@shared/growing/emergence-forecast';
import { germinationOf } from '@shared/growing/germination';
import { germinationVerdict } from '@shared/growing/germination-verdict';
import { likelyCausesOfLateness } from '@shared/growing/late-emergence';
import { germinationCounts, type PlantingState } from '@shared/growing/planting-history';
import { ageOfLot } from '@shared/growing/seed-stock';
import { timeWeightedStatistics } from '@shared/series/time-weighted-statistics';
import type { Clock } from '../clock';
import type { CropsService } from '../crops/crops-service';
import type { Transactions, Tx } from '../database/transactions';
import { conflict } from '../http/request-problem';
import type { PlantingEntity } from '../plantings/planting-entity';
import type { PlantingsService } from '../plantings/plantings-service';
import type { EmergenceService } from './emergence-service';
import { HOURLY_GAP_MS, type ShelfTime, type Warmth } from './shelf-warmth';

/** What {@link GerminationService} works with. */
export interface GerminationParts {
  readonly transactions: Transactions;
  readonly plantings: PlantingsService;
  readonly crops: CropsService;
  readonly emergence: EmergenceService;
  /** What is known of the lot that was sown: its year, and what its own test found [%]. */
  readonly lotFacts: (
    tx: Tx,
    roomId: string,
    lotId: string,
  ) => Promise<{ readonly packedYear: number | null; readonly testPct: number | null }>;
  /** Whether lamps are planned over a shelf in a day. */
  readonly isDark: (tx: Tx, shelfId: string) => Promise<boolean>;
  readonly now: Clock;
}

const DAY_MS = 86_400_000;

/** How sowings come up: counts, figures, forecasts, and what may be wrong. */
export class GerminationService {
  constructor(private readonly parts: GerminationParts) {}

  /**
   * How a sowing comes up.
   *
   * @param roomId - Of which room.
   * @param plantingId - Which.
   * @returns Curve, figures, verdict and, while nothing is up, the forecast.
   * @throws {@link RequestProblem} 404 without such a planting, 409 `NOT_SOWN` for plants that were not sown here.
   */
  async view(roomId: string, plantingId: string): Promise<GerminationView> {
    const { transactions, plantings, crops } = this.parts;
    const tx = transactions.plain;
    const planting = await plantings.planting(tx, roomId, plantingId);
    const state = await plantings.state(tx, plantingId);
    const { sown } = state;
    if (sown === null)
      throw conflict('NOT_SOWN', 'These plants were not sown here: there is nothing to count.');
    const counts = germinationCounts(state);
    const figures = germinationOf(sown, counts);
    const crop = planting.cropId === null ? null : await crops.crop(tx, roomId, planting.cropId);
    const { percent, firstDay, lastDay, spreadDays, t50Days, meanTimeDays, standardErrorDays } = figures;
    return {
      sown,
      up: figures.up,
      curve: counts.map(({ day, up }) => ({
        at: new Date(state.startedAt + day * DAY_MS).toISOString(),
        day,
        up,
        percent: (100 * up) / sown,
      })),
      percent,
      firstDay,
      lastDay,
      spreadDays,
      t50Days,
      meanTimeDays,
      standardErrorDays,
      isOpen: state.stage === 'sown' || state.stage === 'emerging',
      verdict: figures.up === 0 ? null : await this.verdict(tx, planting, crop, { up: figures.up, sown }),
      forecast:
        state.stage === 'sown' && crop !== null ? await this.forecast(tx, planting, crop, state) : null,
    };
  }

  /** By shelf: its sowings that still come up, with when to expect the first. */
  async sowingsOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, SowingNow[]>> {
    const standing = await this.parts.plantings.standingOn(tx, shelfIds);
    const byShelf = new Map<string, SowingNow[]>();
    for (const [shelfId, plantings] of standing) {
      const sowings: SowingNow[] = [];
      for (const planting of plantings) {
        const { sown, stage } = planting;
        if (sown === null || (stage !== 'sown' && stage !== 'emerging')) continue;
        sowings.push(await this.sowingNow(tx, planting, sown));
      }
      byShelf.set(shelfId, sowings);
    }
    return byShelf;
  }

  private async sowingNow(tx: Tx, planting: PlantingEntity, sown: number): Promise<SowingNow> {
    const { id: plantingId, roomId, cropId, startedAt, up, stage } = planting;
    const crop = cropId === null || stage !== 'sown' ? null : await this.parts.crops.crop(tx, roomId, cropId);
    const places = crop === null ? [] : await this.parts.plantings.placesOf(tx, plantingId);
    const found = crop && (await this.parts.emergence.forecast(tx, roomId, crop, { startedAt, places }));
    const { earliest = null, latest = null, isLate = false } = found?.forecast ?? {};
    return {
      plantingId,
      sown,
      up: up ?? 0,
      day: Math.floor((this.parts.now().getTime() - startedAt.getTime()) / DAY_MS),
      expectedFrom: isoOf(earliest),
      expectedTo: isoOf(latest),
      isLate,
    };
  }

  private async verdict(
    tx: Tx,
    planting: PlantingEntity,
    crop: Crop | null,
    { up, sown }: { readonly up: number; readonly sown: number },
  ): Promise<GerminationView['verdict']> {
    const { lotPct, age } = await this.seedFacts(tx, planting, crop);
    const standard = crop?.seed?.minimumGerminationPct ?? null;
    const verdict = germinationVerdict(up, sown, {
      lotPct,
      standardPct: standard?.value ?? null,
      ageYears: age.years,
      lifeYears: age.lifeYears,
    });
    return {
      lowPct: verdict.found.lowPct,
      highPct: verdict.found.highPct,
      lotPct,
      againstLot: verdict.againstLot,
      standardPct: standard?.value ?? null,
      standardSource: standard?.source ?? null,
      againstStandard: verdict.againstStandard,
      age: verdict.age,
    };
  }

  private async forecast(
    tx: Tx,
    planting: PlantingEntity,
    crop: Crop,
    { startedAt }: PlantingState,
  ): Promise<EmergenceForecastView | null> {
    const places = await this.parts.plantings.placesOf(tx, planting.id);
    const found = await this.parts.emergence.forecast(tx, planting.roomId, crop, {
      startedAt: new Date(startedAt),
      places,
    });
    if (found === null) return null;
    const { forecast, warmth, now } = found;
    const { earliest, latest, published, basis, outlookC, coverage, isLate } = forecast;
    return {
      earliest: viewOf(earliest),
      latest: viewOf(latest),
      published: published.map((one) => ({ source: one.source, at: isoOf(one) })),
      basis,
      measuredBy: warmth.measuredBy,
      outlookC,
      coverage,
      isLate,
      causes: isLate ? await this.causes(tx, planting, crop, { forecast, warmth, now, places }) : [],
    };
  }

  private async causes(
    tx: Tx,
    planting: PlantingEntity,
    crop: Crop,
    known: {
      readonly forecast: EmergenceForecast;
      readonly warmth: Warmth;
      readonly now: number;
      readonly places: readonly ShelfTime[];
    },
  ): Promise<string[]> {
    if (crop.seed === null) return [];
    const { series } = known.warmth;
    const window = { from: planting.startedAt.getTime(), to: known.now, maxGapMs: HOURLY_GAP_MS };
    const shelfId = known.places.at(-1)?.shelfId ?? null;
    return likelyCausesOfLateness({
      seed: crop.seed,
      meanC: timeWeightedStatistics(series, window).mean,
      maxC: series.length === 0 ? null : Math.max(...series.map(({ value }) => value)),
      depthMm: planting.depthMm,
      ageYears: (await this.seedFacts(tx, planting, crop)).age.years,
      isDark: shelfId === null ? null : await this.parts.isDark(tx, shelfId),
      coverage: known.forecast.coverage,
    });
  }

  /** The seed that was sown: its age then, and what its lot's own test found. */
  private async seedFacts(
    tx: Tx,
    { roomId, lotId, startedOn }: PlantingEntity,
    crop: Crop | null,
  ): Promise<{ readonly lotPct: number | null; readonly age: ReturnType<typeof ageOfLot> }> {
    const lot = lotId === null ? null : await this.parts.lotFacts(tx, roomId, lotId);
    return {
      lotPct: lot?.testPct ?? null,
      age: ageOfLot(lot?.packedYear ?? null, crop?.seed ?? null, startedOn),
    };
  }
}

function viewOf(forecast: SourceForecast | null): EmergenceForecastView['earliest'] {
  return forecast && { source: forecast.source, at: isoOf(forecast) };
}

function isoOf(forecast: SourceForecast | null): string | null {
  return forecast === null || forecast.at === null ? null : new Date(forecast.at).toISOString();
}
