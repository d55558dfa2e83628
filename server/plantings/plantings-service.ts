import type { PlantingSummary } from '@shared/contracts/board';
import type { Photo } from '@shared/contracts/photos';
import type { PlantingEventView } from '@shared/contracts/planting-events';
import type { Planting, PlantingDetail } from '@shared/contracts/plantings';
import type { PlantingState } from '@shared/growing/planting-history';
import type { Transactions, Tx } from '../database/transactions';
import { encodeCursor } from '../http/cursor';
import type { PlantingEntity } from './planting-entity';
import type { PlantingEventsStore, StoredEvent, StoredPlace } from './planting-events-store';
import type { PlantingRecords } from './planting-records';
import { summaryOf, type PlantingFilter, type PlantingsStore } from './plantings-store';

/** What {@link PlantingsService} reads from. */
export interface PlantingsParts {
  readonly transactions: Transactions;
  readonly plantings: PlantingsStore;
  readonly events: PlantingEventsStore;
  readonly records: PlantingRecords;
  /** Photos of a planting, newest first. */
  readonly photosOf: (tx: Tx, plantingId: string) => Promise<Photo[]>;
  /** A lot in words; null for one of another room or none. */
  readonly lotName: (tx: Tx, roomId: string, lotId: string) => Promise<string | null>;
}

/** What grows where, and its story. */
export class PlantingsService {
  constructor(private readonly parts: PlantingsParts) {}

  /** By shelf: its plantings that have not ended, oldest first. */
  async plantingsOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, PlantingSummary[]>> {
    const found = await this.parts.plantings.plantingsOn(tx, shelfIds);
    return new Map([...found].map(([shelfId, plantings]) => [shelfId, plantings.map(summaryOf)]));
  }

  /** By shelf: its plantings that have not ended, with all that is kept of them. */
  standingOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, PlantingEntity[]>> {
    return this.parts.plantings.plantingsOn(tx, shelfIds);
  }

  /** Plantings of a room, newest first, and where the next page begins. */
  async list(
    roomId: string,
    filter: PlantingFilter,
  ): Promise<{ plantings: Planting[]; nextCursor: string | null }> {
    const found = await this.parts.plantings.list(this.parts.transactions.plain, roomId, filter);
    const last = found.length === filter.limit ? found.at(-1) : undefined;
    return {
      plantings: found.map(({ planting }) => planting),
      nextCursor: last === undefined ? null : encodeCursor(last.startedAt.toISOString(), last.planting.id),
    };
  }

  /** What a planting's events leave. */
  state(tx: Tx, plantingId: string): Promise<PlantingState> {
    return this.parts.records.state(tx, plantingId);
  }

  /** Where a planting stood, in order. */
  placesOf(tx: Tx, plantingId: string): Promise<StoredPlace[]> {
    return this.parts.events.placesOf(tx, plantingId);
  }

  /** One planting with all that is kept of it; 404 when the room has none such. */
  planting(tx: Tx, roomId: string, plantingId: string): Promise<PlantingEntity> {
    return this.parts.plantings.planting(tx, roomId, plantingId);
  }

  /**
   * A planting with its story.
   *
   * @param roomId - Of which room.
   * @param plantingId - Which.
   * @param tx - To read with.
   * @returns Places, events and what can be undone.
   * @throws {@link RequestProblem} 404 when the room has none such.
   */
  async detail(
    roomId: string,
    plantingId: string,
    tx = this.parts.transactions.plain,
  ): Promise<PlantingDetail> {
    const { plantings, events, photosOf, lotName } = this.parts;
    const { planting, startedAt } = await plantings.listed(tx, roomId, plantingId);
    const { lotId, source, depthMm } = await plantings.planting(tx, roomId, plantingId);
    const story = await events.of(tx, plantingId);
    const places = await events.placesOf(tx, plantingId);
    return {
      ...planting,
      lotId,
      lotName: lotId === null ? null : await lotName(tx, roomId, lotId),
      source,
      depthMm,
      startedAt: startedAt.toISOString(),
      places: places.map(({ shelfId, shelfLabel, fromAt, toAt }) => ({
        shelfId,
        shelfLabel,
        from: fromAt.toISOString(),
        to: toAt?.toISOString() ?? null,
      })),
      events: [...story].sort((one, other) => one.at.getTime() - other.at.getTime()).map(eventView),
      photos: await photosOf(tx, plantingId),
      undoableEventId: undoable(story),
    };
  }
}

/**
 * An event as the API tells it.
 *
 * @param event - As stored.
 * @returns The view.
 */
export function eventView({
  seq: _,
  personId: _by,
  taskId: _task,
  at,
  ...event
}: StoredEvent): PlantingEventView {
  return { ...event, at: at.toISOString() };
}

/** The newest event, unless it is how the planting began or how another one took it in. */
function undoable(story: readonly StoredEvent[]): string | null {
  const last = story.at(-1);
  if (last === undefined || last.seq === 0) return null;
  return last.kind === 'ended' && last.otherPlantingId !== null ? null : last.id;
}
