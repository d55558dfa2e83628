import type { Shelf } from '@shared/contracts/rooms';
import { wantedClimate } from '@shared/growing/advice/standing-planting';
import type { Crop } from '@shared/growing/crops/crop';
import { lampOutput } from '@shared/growing/lamp-wear';
import { lightShortage, type LampOverPlanting, type LightShortage } from '@shared/growing/light-need';
import { dayBounds } from '@shared/series/room-days';
import type { ValueRange } from '@shared/series/time-weighted-statistics';
import type { Tx } from '../database/transactions';
import type { ShelfTime } from '../germination/shelf-warmth';
import type { PlantingEntity } from '../plantings/planting-entity';
import type { RoomsService } from '../rooms/rooms-service';
import type { ShelfPlansService } from '../rooms/shelf-plans-service';
import type { ShelfLight, ShelfLightDay } from './shelf-light';

/** What {@link LightShortages} works with. */
export interface LightShortageParts {
  readonly rooms: Pick<RoomsService, 'racksOf'>;
  readonly plans: ShelfPlansService;
  readonly light: ShelfLight;
  readonly placesOf: (tx: Tx, plantingId: string) => Promise<readonly ShelfTime[]>;
}

/** A planting in its room's calendar, up to an instant. */
export interface PlantingInLight {
  readonly planting: PlantingEntity;
  readonly timeZone: string;
  /** [ms] */
  readonly to: number;
}

const HOUR_MS = 3_600_000;
/** Three finished days, whatever the clocks do, and today. */
const LOOK_BACK_MS = 4.5 * 24 * HOUR_MS;
const unknownLamp: LampOverPlanting = { plannedHours: null, output: null };

/** Tells of plantings that they have lived on too little light where they stand, and why that may be. */
export class LightShortages {
  constructor(private readonly parts: LightShortageParts) {}

  /**
   * Whether a planting is short of light.
   *
   * @param tx - To read with.
   * @param of - Which, and up to when.
   * @param crop - Its crop.
   * @returns The shortage; null when there is none, or when its crop has no figure for its stage.
   */
  async shortageOf(tx: Tx, of: PlantingInLight, crop: Crop): Promise<LightShortage | null> {
    const { id, crop: name, stage } = of.planting;
    const wanted = wantedClimate({ id, name, crop, stage })?.dliMolM2D ?? null;
    if (wanted === null) return null;
    const places = await this.parts.placesOf(tx, id);
    const days = await this.parts.light.along(tx, places, of.timeZone, of.to - LOOK_BACK_MS, of.to);
    return this.among(tx, of, places, days, wanted.value);
  }

  /**
   * Whether a planting is short of light, by days that were read already. Only days since it stands where it does and is
   * at its stage count: the light before was another's, or for something that wanted less.
   */
  async among(
    tx: Tx,
    of: PlantingInLight,
    places: readonly ShelfTime[],
    days: readonly ShelfLightDay[],
    wanted: ValueRange,
  ): Promise<LightShortage | null> {
    const { planting, timeZone, to } = of;
    const since = Math.max(
      places.at(-1)?.fromAt.getTime() ?? 0,
      dayBounds(planting.stageSince, timeZone).end,
    );
    const own = days.filter(({ day, end }) => end <= to && dayBounds(day, timeZone).start >= since);
    const isShort = lightShortage(own, wanted, unknownLamp) !== null;
    return isShort ? lightShortage(own, wanted, await this.lampOver(tx, of)) : null;
  }

  /** What is known of the lamp over a planting: yesterday's plan, and its wear by the light measured since it was fitted. */
  private async lampOver(tx: Tx, { planting, timeZone, to }: PlantingInLight): Promise<LampOverPlanting> {
    const { shelfId, roomId } = planting;
    if (shelfId === null) return unknownLamp;
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
