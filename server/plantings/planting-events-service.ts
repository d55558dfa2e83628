import type { PlantingNow, PlantingObservation, PlantingStep } from '@shared/contracts/planting-events';
import type { PlantingDetail } from '@shared/contracts/plantings';
import { roleSuffices, type Role } from '@shared/contracts/people';
import { shelfOf } from '@shared/growing/planting-history';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { Tx } from '../database/transactions';
import { conflict, invalidField, RequestProblem } from '../http/request-problem';
import type { RoomsService } from '../rooms/rooms-service';
import { noteInstant } from './note-instant';
import type { PlantingEntity } from './planting-entity';
import type { NewEvent, PlantingEventsStore, StoredEvent } from './planting-events-store';
import type { PlantingRecords } from './planting-records';
import { eventView, type PlantingsService } from './plantings-service';
import type { PlantingsStore } from './plantings-store';

/** What {@link PlantingEventsService} works with. */
export interface PlantingEventsParts {
  readonly plantings: PlantingsStore;
  readonly events: PlantingEventsStore;
  readonly records: PlantingRecords;
  readonly reader: PlantingsService;
  readonly rooms: Pick<RoomsService, 'requireShelf'>;
  readonly changes: RoomChanges;
  readonly now: Clock;
}

/** What helpers note, and may take back themselves. */
const observations: readonly StoredEvent['kind'][] = ['counted', 'harvested', 'watered', 'noted'];

/** Notes what happens to plantings, and takes it back. */
export class PlantingEventsService {
  constructor(private readonly parts: PlantingEventsParts) {}

  /**
   * Notes an observation or what was done.
   *
   * @param by - Who.
   * @param timeZone - Of the room.
   * @param plantingId - Which planting.
   * @param happened - What.
   * @returns The planting after it.
   * @throws {@link RequestProblem} 404 for another room's planting or shelf, 422 where it can't have happened so.
   */
  note(
    by: RoomAuthor,
    timeZone: string,
    plantingId: string,
    happened: PlantingObservation | PlantingStep,
  ): Promise<PlantingNow> {
    const { changes, plantings, records, events, rooms, now } = this.parts;
    return changes.make(by, async (tx) => {
      await plantings.lock(tx, by.roomId, plantingId);
      if (happened.kind === 'moved' && happened.shelfId !== null) {
        await rooms.requireShelf(tx, by.roomId, happened.shelfId);
      }
      const event = { ...eventOf(happened), at: noteInstant(happened.at, now()), personId: by.personId };
      const { eventId, state } = await records.append(tx, plantingId, event, timeZone);
      const noted = (await events.of(tx, plantingId)).find(({ id }) => id === eventId);
      if (noted === undefined) throw new Error(`event ${eventId} was not stored`);
      const { stage, sown, up, count } = state;
      const result = { event: eventView(noted), stage, sown, up, count, shelfId: shelfOf(state) };
      return { result, action: `planting.${happened.kind}`, subjectId: plantingId, detail: { ...happened } };
    });
  }

  /** Parts so many plants from a planting; they become one of their own. */
  split(
    by: RoomAuthor,
    timeZone: string,
    plantingId: string,
    part: {
      readonly count: number;
      readonly shelfId?: string | null | undefined;
      readonly container?: string | undefined;
      readonly note: string;
      readonly at?: string | undefined;
    },
  ): Promise<PlantingDetail> {
    const { changes, plantings, records, reader, rooms, now } = this.parts;
    return changes.make(by, async (tx) => {
      const whole = await plantings.lock(tx, by.roomId, plantingId);
      const before = await records.state(tx, plantingId);
      const shelfId = part.shelfId === undefined ? shelfOf(before) : part.shelfId;
      if (shelfId !== null) await rooms.requireShelf(tx, by.roomId, shelfId);
      const parting = {
        kind: 'split' as const,
        at: noteInstant(part.at, now()),
        count: part.count,
        note: part.note,
        personId: by.personId,
      };
      const stage = before.stage === 'emerging' || before.stage === 'sown' ? 'seedling' : before.stage;
      const start: NewEvent = {
        ...parting,
        shelfId,
        stage,
        container: part.container ?? before.container,
        otherPlantingId: plantingId,
      };
      const partId = await records.begin(tx, identityOf(whole), start, timeZone);
      await records.append(tx, plantingId, { ...parting, otherPlantingId: partId }, timeZone);
      const result = await reader.detail(by.roomId, partId, tx);
      return { result, action: 'planting.split', subjectId: plantingId, detail: { ...part, partId } };
    });
  }

  /** Takes the plants of another planting of the same crop in; the other ends. */
  merge(
    by: RoomAuthor,
    timeZone: string,
    plantingId: string,
    other: { readonly otherId: string; readonly note: string; readonly at?: string | undefined },
  ): Promise<PlantingDetail> {
    const { changes, plantings, records, reader, now } = this.parts;
    const { otherId, note } = other;
    return changes.make(by, async (tx) => {
      if (otherId === plantingId) throw invalidField('body.otherId', 'is the planting itself');
      // Held in one order, so that two merges the other way round do not wait for each other.
      const held = new Map<string, PlantingEntity>();
      for (const id of [plantingId, otherId].sort()) held.set(id, await plantings.lock(tx, by.roomId, id));
      const [receiver, giver] = [held.get(plantingId), held.get(otherId)];
      if (receiver?.cropId !== giver?.cropId || receiver?.crop !== giver?.crop) {
        throw invalidField('body.otherId', 'is a planting of another crop');
      }
      const { count, stage } = await records.state(tx, otherId);
      if (stage === 'sown' || stage === 'ended')
        throw invalidField('body.otherId', 'has no plants to take in');
      const at = noteInstant(other.at, now());
      const shared = { at, count, note, personId: by.personId };
      await records.append(tx, plantingId, { ...shared, kind: 'merged', otherPlantingId: otherId }, timeZone);
      await records.append(tx, otherId, { ...shared, kind: 'ended', otherPlantingId: plantingId }, timeZone);
      const result = await reader.detail(by.roomId, plantingId, tx);
      return { result, action: 'planting.merge', subjectId: plantingId, detail: { ...other, count } };
    });
  }

  /**
   * Takes back what was noted last; with a parting or a taking in, the other planting's side of it too.
   *
   * @param by - Who, with their role: a helper may take back their own observations.
   * @param timeZone - Of the room.
   * @param plantingId - Which planting.
   * @param eventId - Which event.
   * @throws {@link RequestProblem} 404 without such an event, 403 for somebody else's, 409 for any but the newest.
   */
  undo(
    by: RoomAuthor & { readonly role: Role },
    timeZone: string,
    plantingId: string,
    eventId: string,
  ): Promise<void> {
    const { changes, plantings, records, events } = this.parts;
    const { roomId, personId } = by;
    return changes.make({ roomId, personId }, async (tx) => {
      await plantings.lock(tx, roomId, plantingId);
      const event = (await events.of(tx, plantingId)).find(({ id }) => id === eventId);
      if (event === undefined) throw new RequestProblem(404, 'NOT_FOUND', 'There is no such event.');
      requireOwn(by, event);
      if (event.kind === 'ended' && event.otherPlantingId !== null) {
        throw conflict('TAKEN_IN', 'Another planting took these plants in. Undo it there.');
      }
      await records.takeBack(tx, plantingId, eventId, timeZone);
      await this.undoOtherSide(tx, roomId, timeZone, event);
      const { kind, count, at } = event;
      return {
        result: undefined,
        action: 'planting.undo',
        subjectId: plantingId,
        detail: { kind, count, at },
      };
    });
  }

  private async undoOtherSide(tx: Tx, roomId: string, timeZone: string, event: StoredEvent): Promise<void> {
    const { plantings, records, events } = this.parts;
    const otherId = event.otherPlantingId;
    if (otherId === null) return;
    await plantings.lock(tx, roomId, otherId);
    const story = await events.of(tx, otherId);
    const last = story.at(-1);
    if (event.kind === 'split') {
      if (story.length > 1) {
        throw conflict(
          'HAS_HISTORY',
          'Something has happened to the plants parted from these. Undo that first.',
        );
      }
      await plantings.remove(tx, otherId);
    } else if (last !== undefined) {
      await records.takeBack(tx, otherId, last.id, timeZone);
    }
  }
}

function requireOwn(by: { readonly personId: string; readonly role: Role }, event: StoredEvent): void {
  const isOwn = event.personId === by.personId && observations.includes(event.kind);
  if (isOwn || roleSuffices(by.role, 'grower')) return;
  throw new RequestProblem(403, 'NOT_YOURS', 'A helper can take back their own observations; ask a grower.');
}

function identityOf(planting: PlantingEntity): Parameters<PlantingRecords['begin']>[1] {
  const { roomId, cropId, crop, variety, habit, lotId, source, depthMm } = planting;
  return { roomId, cropId, crop, variety, habit, lotId, source, depthMm };
}

function eventOf(happened: PlantingObservation | PlantingStep): Omit<NewEvent, 'at'> {
  if (happened.kind === 'counted') {
    const { kind, note, up, isLast } = happened;
    return { kind, note, count: up, isLast };
  }
  const { at: _, ...event } = happened;
  return event;
}
