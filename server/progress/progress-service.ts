import type { PlantingProgress } from '@shared/contracts/planting-progress';
import { degreeDaysFromSeries } from '@shared/climate/degree-days';
import { wantedClimate } from '@shared/growing/advice/standing-planting';
import { daysBetween } from '@shared/growing/calendar-day';
import type { Crop } from '@shared/growing/crops/crop';
import { transplantDates } from '@shared/growing/sowing-window';
import { dayBounds } from '@shared/series/room-days';
import type { Clock } from '../clock';
import type { CropsService } from '../crops/crops-service';
import type { Transactions, Tx } from '../database/transactions';
import { HOURLY_GAP_MS, type ShelfTime, type ShelfWarmth } from '../germination/shelf-warmth';
import type { PlantingEntity } from '../plantings/planting-entity';
import type { PlantingsService } from '../plantings/plantings-service';
import type { RoomCalendar } from '../seed/seed-service';
import type { LightShortages } from './light-shortages';
import type { ShelfLight } from './shelf-light';

/** What {@link ProgressService} works with. */
export interface ProgressParts {
  readonly transactions: Transactions;
  readonly plantings: PlantingsService;
  readonly crops: CropsService;
  readonly warmth: ShelfWarmth;
  readonly light: ShelfLight;
  readonly shortages: LightShortages;
  readonly now: Clock;
}

/** A planting with what its progress is counted along. */
interface Course {
  readonly planting: PlantingEntity;
  readonly crop: Crop;
  readonly places: readonly ShelfTime[];
  readonly timeZone: string;
  /** [ms] */
  readonly from: number;
  /** Its end, or now [ms]. */
  readonly to: number;
}

const DAY_MS = 86_400_000;
/** The warmth to go on with is that of so long. */
const OUTLOOK_MS = 3 * DAY_MS;
/** So many days of light are told. */
const LIGHT_DAYS = 30;

/** How far plantings have grown against what they need: warmth, light, and when they can go out. */
export class ProgressService {
  constructor(private readonly parts: ProgressParts) {}

  /**
   * The progress of a planting.
   *
   * @param room - Whose.
   * @param plantingId - Which.
   * @returns Degree days, light and the date of transplanting; null where its crop has no figure.
   * @throws {@link RequestProblem} 404 without such a planting.
   */
  async view(room: RoomCalendar, plantingId: string): Promise<PlantingProgress> {
    const { transactions, plantings, crops, now } = this.parts;
    const tx = transactions.plain;
    const planting = await plantings.planting(tx, room.id, plantingId);
    const present = now();
    const crop = planting.cropId === null ? null : await crops.crop(tx, room.id, planting.cropId);
    const at = present.toISOString();
    if (crop === null) return { at, degreeDays: null, light: null, transplant: null };
    const { endedAt } = await plantings.state(tx, plantingId);
    const from = planting.startedAt.getTime();
    const course: Course = {
      planting,
      crop,
      places: await plantings.placesOf(tx, plantingId),
      timeZone: room.timeZone,
      from,
      // Started this very moment: there is no time yet to have grown in.
      to: Math.max(endedAt ?? present.getTime(), from + 1),
    };
    const degreeDays = await this.degreeDays(tx, course);
    return {
      at,
      degreeDays,
      light: await this.light(tx, course),
      transplant: transplantOf(course, degreeDays?.perDayCD ?? null),
    };
  }

  private async degreeDays(tx: Tx, course: Course): Promise<PlantingProgress['degreeDays']> {
    const { crop, places, from, to } = course;
    if (crop.degreeDays === null) return null;
    const { value, source } = crop.degreeDays;
    const { baseC, upperC } = value;
    const limits = upperC === null ? { baseC } : { baseC, upperC };
    const { series } = await this.parts.warmth.along(tx, places, from, to, 'airTemperature');
    const sumOver = (start: number) =>
      degreeDaysFromSeries(series, { from: start, to, maxGapMs: HOURLY_GAP_MS, ...limits });
    const whole = sumOver(from);
    const latest = sumOver(Math.max(from, to - OUTLOOK_MS));
    const perDayCD = latest.coveredMs === 0 ? null : (latest.degreeDaysCD * DAY_MS) / latest.coveredMs;
    const coverage = Math.min(1, whole.coveredMs / (to - from));
    return { baseC, upperC, source, sumCD: whole.degreeDaysCD, perDayCD, coverage };
  }

  private async light(tx: Tx, course: Course): Promise<PlantingProgress['light']> {
    const { planting, crop, places, timeZone, from, to } = course;
    const { id, crop: name, stage } = planting;
    const figure = wantedClimate({ id, name, crop, stage })?.dliMolM2D ?? null;
    if (figure === null) return null;
    const measured = await this.parts.light.along(tx, places, timeZone, from, to);
    const finished = measured.filter(({ end }) => end <= to).slice(-LIGHT_DAYS);
    const sums = measured.flatMap(({ dliMolM2D }) => (dliMolM2D === null ? [] : [dliMolM2D]));
    const shortage = await this.parts.shortages.among(tx, course, places, finished, figure.value);
    return {
      wanted: { ...figure.value },
      source: figure.source,
      days: finished.map(({ day, dliMolM2D, lightHours, coverage }) => ({
        day,
        dliMolM2D,
        lightHours,
        coverage,
      })),
      sumMolM2: sums.length === 0 ? null : sums.reduce((sum, dli) => sum + dli, 0),
      shortage: shortage && { ...shortage, causes: [...shortage.causes] },
    };
  }
}

function transplantOf(
  { planting, crop, timeZone, to }: Course,
  perDayCD: number | null,
): PlantingProgress['transplant'] {
  const { origin, stage, startedOn } = planting;
  if (origin !== 'sown' || stage === 'out' || stage === 'ended' || stage === 'fruiting') return null;
  const dates = transplantDates(crop.sowing, startedOn);
  if (dates === null) return null;
  const today = dayBounds(to, timeZone).date;
  const degreeDaysTo = (day: string): number | null =>
    perDayCD === null ? null : perDayCD * Math.max(0, daysBetween(today, day));
  return {
    ...dates,
    degreeDaysToEarliest: degreeDaysTo(dates.earliest),
    degreeDaysToLatest: degreeDaysTo(dates.latest),
  };
}
