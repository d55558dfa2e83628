import { hoursADay } from '@shared/climate/daily-lamp-hours';
import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { Task } from '@shared/contracts/care';
import type { RoomRange } from '@shared/contracts/room-ranges';
import type { Room, Shelf, WantedLight, WantedRange } from '@shared/contracts/rooms';
import type { AdvisedShelf } from '@shared/growing/advice/advice';
import { adviceSubjects, adviceTasks, type AdviceTask } from '@shared/growing/advice/advice-tasks';
import { adviseShelf, type ShelfAdvice } from '@shared/growing/advice/shelf-advice';
import type { StandingPlanting } from '@shared/growing/advice/standing-planting';
import type { LightShortage } from '@shared/growing/light-need';
import { dayBounds } from '@shared/series/room-days';
import { isDeepStrictEqual } from 'node:util';
import type { OpenTask } from '../care/open-tasks';
import type { Clock } from '../clock';
import type { CropsService } from '../crops/crops-service';
import type { Transactions, Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import type { LiveFeed } from '../live/live-feed';
import type { PlantingsService } from '../plantings/plantings-service';
import type { LightShortages } from '../progress/light-shortages';
import type { RoomHooks } from '../rooms/room-hooks';
import type { RoomsService } from '../rooms/rooms-service';
import type { AdviceContent, AdviceStore, ShelfMeans } from './advice-store';
import { plantingLight, plantingRanges, rangesFor, type UnsetRange } from './planting-ranges';

/** What {@link AdviceService} works with. */
export interface AdviceParts {
  readonly transactions: Transactions;
  readonly advice: AdviceStore;
  readonly rooms: Pick<RoomsService, 'roomOf' | 'racksOf' | 'all'>;
  readonly plantings: PlantingsService;
  readonly crops: CropsService;
  /** Reads and writes wanted ranges. */
  readonly ranges: {
    of(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedRange[]>>;
    /** Those that hold where nobody and nothing says otherwise. */
    ofRoom(tx: Tx, roomId: string): Promise<RoomRange[]>;
    set(tx: Tx, shelfId: string, range: WantedRange): Promise<void>;
    clear(tx: Tx, shelfId: string, quantity: WantedRange['quantity']): Promise<boolean>;
  };
  /** Whether a planting has lived on too little light. */
  readonly shortageOf: LightShortages['shortageOf'];
  /** Reads and writes the wanted light of a day. */
  readonly light: {
    of(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedLight>>;
    set(tx: Tx, shelfId: string, light: WantedLight): Promise<void>;
    clear(tx: Tx, shelfId: string, source: WantedLight['source']): Promise<boolean>;
  };
  readonly hooks: Pick<RoomHooks, 'onRangeChanged' | 'onWantedLightChanged'>;
  readonly tasks: {
    open(tx: Tx, task: OpenTask): Promise<Task>;
    withdraw(tx: Tx, taskId: string): Promise<boolean>;
  };
  readonly feed: LiveFeed;
  readonly now: Clock;
}

/** What a refreshing changed. */
interface Changed {
  readonly advice: ShelfAdviceView[];
  readonly tasks: Task[];
  hasRoomChanged: boolean;
}

/** Temperatures without the mat are those of so long. */
const UNHEATED_SPAN_MS = 72 * 3_600_000;

/**
 * Keeps advice on shelves: what stands there and how far it is says what lamps, mat and air should be. It sets the wanted
 * ranges that nobody set for the shelf, those of the room where plantings want none, and asks for care once.
 */
export class AdviceService {
  constructor(private readonly parts: AdviceParts) {}

  /** Advice on shelves as it was worked out last, by shelf. */
  adviceFor(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, ShelfAdviceView>> {
    return this.parts.advice.of(tx, shelfIds);
  }

  /** Advice on one shelf, worked out where it never was; 404 when the room has no such shelf. */
  async shelfAdvice(roomId: string, shelfId: string): Promise<ShelfAdviceView> {
    const { rooms, transactions } = this.parts;
    const shelves = (await rooms.racksOf(roomId)).flatMap((rack) => rack.shelves);
    if (!shelves.some(({ id }) => id === shelfId)) throw notFound('shelf');
    const held = (await this.adviceFor(transactions.plain, [shelfId])).get(shelfId);
    if (held !== undefined) return held;
    await this.refresh(roomId);
    const found = (await this.adviceFor(transactions.plain, [shelfId])).get(shelfId);
    if (found === undefined) throw notFound('shelf'); // Retired in between.
    return found;
  }

  /** Works out every room's advice; temperatures change without anybody's doing. */
  async refreshAll(): Promise<void> {
    const { rooms, transactions } = this.parts;
    for (const { id } of await rooms.all(transactions.plain)) await this.refresh(id);
  }

  /**
   * Works out a room's advice, sets ranges and asks for care accordingly, and tells dashboards what is new.
   *
   * @param roomId - Which room.
   */
  async refresh(roomId: string): Promise<void> {
    const { transactions, feed } = this.parts;
    const changed = await transactions.run((tx) => this.refreshIn(tx, roomId));
    for (const advice of changed.advice) feed.publish(roomId, 'shelf:advised', advice);
    for (const task of changed.tasks) feed.publish(roomId, 'task:changed', task);
    if (changed.hasRoomChanged) feed.publish(roomId, 'room:changed', { roomId });
  }

  private async refreshIn(tx: Tx, roomId: string): Promise<Changed> {
    const { advice, rooms, now } = this.parts;
    const changed: Changed = { advice: [], tasks: [], hasRoomChanged: false };
    await advice.lockRoom(tx, roomId);
    const room = await rooms.roomOf(tx, roomId);
    if (room === null) return changed;
    const shelves = (await rooms.racksOf(roomId)).flatMap((rack) => rack.shelves);
    const advised = await this.advisedShelves(tx, room, shelves);
    const roomRanges = await this.parts.ranges.ofRoom(tx, roomId);
    const today = dayBounds(now().getTime(), room.timeZone).date;
    for (const [index, shelf] of shelves.entries()) {
      const seen = advised[index];
      if (seen === undefined) continue;
      const found = adviseShelf(
        seen,
        advised.filter((other) => other !== seen),
      );
      const wanted = rangesFor(plantingRanges(found.wanted), roomRanges);
      const set = await this.setRanges(tx, shelf.id, wanted, changed);
      if (await this.setLight(tx, shelf.id, plantingLight(found.wanted), changed)) {
        set.add('dailyLightIntegral');
      }
      await this.ask(tx, { roomId, shelf, today }, adviceTasks(seen, found), changed);
      const kept = await advice.keep(tx, shelf.id, contentOf(found, set, shelves), now());
      if (kept !== null) changed.advice.push(kept);
    }
    return changed;
  }

  private async advisedShelves(
    tx: Tx,
    { id: roomId, timeZone }: Room,
    shelves: readonly Shelf[],
  ): Promise<AdvisedShelf[]> {
    const { advice, plantings, crops, shortageOf, now } = this.parts;
    const shelfIds = shelves.map(({ id }) => id);
    const standing = await plantings.standingOn(tx, shelfIds);
    const means = await advice.meansOf(tx, shelfIds, new Date(now().getTime() - UNHEATED_SPAN_MS));
    const advised: AdvisedShelf[] = [];
    for (const shelf of shelves) {
      const here: StandingPlanting[] = [];
      const shortages = new Map<string, LightShortage>();
      for (const planting of standing.get(shelf.id) ?? []) {
        const { id, cropId, crop: name, variety, stage } = planting;
        const crop = cropId === null ? null : await crops.crop(tx, roomId, cropId);
        if (crop === null) continue;
        here.push({ id, name: variety === null ? name : `${name} ${variety}`, crop, stage });
        const shortage = await shortageOf(tx, { planting, timeZone, to: now().getTime() }, crop);
        if (shortage !== null) shortages.set(id, shortage);
      }
      advised.push({
        label: shelf.label,
        plantings: namedShortly(here, standing.get(shelf.id) ?? []),
        hasLamp: shelf.lamps.length > 0,
        lampHours: shelf.lamps.length === 0 ? null : hoursADay(shelf.lampHours),
        hasHeatMat: shelf.heatMat !== null,
        isHeatMatOn: shelf.heatMat?.isOn ?? null,
        unheatedC: unheatedC(
          shelf,
          means.find(({ shelfId }) => shelfId === shelf.id),
        ),
        shortages,
      });
    }
    return advised;
  }

  /**
   * Sets what plantings or the room want where no person set a range, and clears what they want no more; tells what
   * is set as plantings want it.
   */
  private async setRanges(
    tx: Tx,
    shelfId: string,
    wanted: readonly UnsetRange[],
    changed: Changed,
  ): Promise<Set<string>> {
    const { ranges, hooks, now } = this.parts;
    const held = (await ranges.of(tx, [shelfId])).get(shelfId) ?? [];
    const [stays, set] = [new Set<string>(), new Set<string>()];
    for (const range of wanted) {
      const before = held.find(({ quantity }) => quantity === range.quantity);
      if (before?.source === 'shelf') continue;
      stays.add(range.quantity);
      if (range.source === 'plantings') set.add(range.quantity);
      if (isSame(before ?? null, range)) continue;
      await ranges.set(tx, shelfId, { ...range, since: now().toISOString() });
      await hooks.onRangeChanged(tx, shelfId, range.quantity);
      changed.hasRoomChanged = true;
    }
    for (const { quantity, source } of held) {
      if (source === 'shelf' || stays.has(quantity)) continue;
      await ranges.clear(tx, shelfId, quantity);
      await hooks.onRangeChanged(tx, shelfId, quantity);
      changed.hasRoomChanged = true;
    }
    return set;
  }

  /** The same for the light of a day; tells whether it is set so. */
  private async setLight(
    tx: Tx,
    shelfId: string,
    wanted: Omit<WantedLight, 'since'> | null,
    changed: Changed,
  ): Promise<boolean> {
    const { light, hooks, now } = this.parts;
    const held = (await light.of(tx, [shelfId])).get(shelfId) ?? null;
    if (held?.source === 'shelf') return false;
    if (isSame(held, wanted)) return wanted !== null;
    if (wanted === null) await light.clear(tx, shelfId, 'plantings');
    else await light.set(tx, shelfId, { ...wanted, since: now().toISOString() });
    await hooks.onWantedLightChanged(tx, shelfId);
    changed.hasRoomChanged = true;
    return wanted !== null;
  }

  /** Asks for care that was not asked for yet, and takes back what is no longer needed and not done. */
  private async ask(
    tx: Tx,
    { roomId, shelf, today }: { readonly roomId: string; readonly shelf: Shelf; readonly today: string },
    wanted: readonly AdviceTask[],
    changed: Changed,
  ): Promise<void> {
    const { advice, tasks } = this.parts;
    const asked = await advice.asked(tx, [shelf.id]);
    for (const about of adviceSubjects) {
      const task = wanted.find((one) => one.about === about);
      const before = asked.find((one) => one.about === about);
      if (task?.change === before?.change) continue;
      if (before !== undefined) {
        if (before.taskId !== null && (await tasks.withdraw(tx, before.taskId)))
          changed.hasRoomChanged = true;
        await advice.forgetAsked(tx, shelf.id, about);
      }
      if (task === undefined) continue;
      const { kind, title, detail, change } = task;
      const opened = await tasks.open(tx, {
        roomId,
        shelfId: shelf.id,
        kind,
        title,
        detail,
        dueOn: today,
        personId: null,
      });
      await advice.setAsked(tx, { shelfId: shelf.id, about, change, taskId: opened.id });
      changed.tasks.push(opened);
    }
  }
}

/** Plantings by their crop's name, with the variety only where two of a crop stand together. */
function namedShortly(
  here: readonly StandingPlanting[],
  entities: readonly { readonly id: string; readonly crop: string }[],
): StandingPlanting[] {
  return here.map((planting) => {
    const crop = entities.find(({ id }) => id === planting.id)?.crop ?? planting.name;
    const isAlone = entities.filter((other) => other.crop === crop).length === 1;
    return isAlone ? { ...planting, name: crop } : planting;
  });
}

/** A mat that is on warms the roots, so that only the air tells what the shelf is without it. */
function unheatedC({ heatMat }: Shelf, means: ShelfMeans | undefined): number | null {
  if (means === undefined) return null;
  return heatMat?.isOn === true ? means.airC : (means.rootZoneC ?? means.airC);
}

/** Whether what is set is what is wanted, since whenever. */
function isSame(held: { readonly since: string } | null, wanted: object | null): boolean {
  if (held === null || wanted === null) return held === wanted;
  const { since: _, ...before } = held;
  return isDeepStrictEqual(before, wanted);
}

function contentOf(found: ShelfAdvice, set: ReadonlySet<string>, shelves: readonly Shelf[]): AdviceContent {
  const idOf = new Map(shelves.map(({ label, id }) => [label, id]));
  return {
    lamps: { ...found.lamps },
    heatMat: { ...found.heatMat },
    wanted: found.wanted.map((one) => ({ ...one, range: { ...one.range }, isSet: set.has(one.quantity) })),
    conflicts: found.conflicts.map((one) => ({ ...one, plantingIds: [...one.plantingIds] })),
    moves: found.moves.flatMap((move) => {
      const shelfId = idOf.get(move.shelf);
      return shelfId === undefined ? [] : [{ ...move, shelfId, plantingIds: [...move.plantingIds] }];
    }),
    dayLength: found.dayLength.map((one) => ({ ...one })),
    notes: [...found.notes],
  };
}
