import type { PlantingProgress } from '@shared/contracts/planting-progress';
import type { Shelf } from '@shared/contracts/rooms';
import { degreeDaysFromSeries } from '@shared/climate/degree-days';
import { wantedClimate } from '@shared/growing/advice/standing-planting';
import { daysBetween } from '@shared/growing/calendar-day';
import type { Crop } from '@shared/growing/crops/crop';
import { lampOutput } from '@shared/growing/lamp-wear';
import { lightShortage, type LampOverPlanting } from '@shared/growing/light-need';
import { transplantDates } from '@shared/growing/sowing-window';
import { dayBounds } from '@shared/series/room-days';
import type { Clock } from '../clock';
import type { CropsService } from '../crops/crops-service';
import type { Transactions, Tx } from '../database/transactions';
import { HOURLY_GAP_MS, type ShelfTime, type ShelfWarmth } from '../germination/shelf-warmth';
import type { PlantingEntity } from '../plantings/planting-entity';
import type { PlantingsService } from '../plantings/plantings-service';
import type { RoomsService } from '../rooms/rooms-service';
import type { ShelfPlansService } from '../rooms/shelf-plans-service';
import type { RoomCalendar } from '../seed/seed-service';
import type { ShelfLight } from './shelf-light';

/** What {@link ProgressService} works with. */
export interface ProgressParts {
  readonly transactions: Transactions;
  readonly plantings: PlantingsService;
  readonly crops: CropsService;
  readonly rooms: Pick<RoomsService, 'racksOf'>;
  readonly plans: ShelfPlansService;
  readonly warmth: ShelfWarmth;
  readonly light: ShelfLight;
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
const HOUR_MS = 3_600_000;
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
    const shortage = lightShortage(finished, figure.value, await this.lampOver(tx, course));
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

  /** What is known of the lamp over a planting: yesterday's plan, and its wear by the light measured since it was fitted. */
  private async lampOver(tx: Tx, { planting, timeZone, to }: Course): Promise<LampOverPlanting> {
    const { shelfId, roomId } = planting;
    if (shelfId === null) return { plannedHours: null, output: null };
    const today = dayBounds(to, timeZone);
    const yesterday = dayBounds(today.start - 1, timeZone);
    const lamps = await this.parts.plans.plannedLamps(
      tx,
      [shelfId],
      new Date(yesterday.start),
      new Date(yesterday.end),
    );
    const plannedMs = (lamps.get(shelfId) ?? []).reduce((sum, { onAt, offAt }) => sum + offAt - onAt, 0);
    const shelves = (await this.parts.rooms.racksOf(roomId)).flatMap((rack) => rack.shelves);
    const lamp = shelves.find(({ id }) => id === shelfId)?.lamps.at(-1);
    const output = lamp === undefined ? null : await this.outputOf(tx, shelfId, lamp, timeZone, to);
    return { plannedHours: plannedMs / HOUR_MS, output };
  }

  private async outputOf(
    tx: Tx,
    shelfId: string,
    { kind, fittedOn }: Shelf['lamps'][number],
    timeZone: string,
    to: number,
  ): Promise<number | null> {
    const fittedAt = dayBounds(fittedOn, timeZone).start;
    if (fittedAt >= to) return null;
    const hoursRun = await this.parts.light.hoursOn(tx, shelfId, timeZone, fittedAt, to);
    if (hoursRun === null) return null;
    return lampOutput({ kind, fittedOn, hoursRun, l70Hours: null, l90Hours: null })?.value ?? null;
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
