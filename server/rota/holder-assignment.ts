import { isDeepStrictEqual } from 'node:util';
import { assignHolders } from '@shared/care/assign-holders';
import { dayBounds } from '@shared/series/room-days';
import type { Clock } from '../clock';
import type { Tx } from '../database/transactions';
import type { RoomsService } from '../rooms/rooms-service';
import type { AssignmentStore } from './assignment-store';
import type { RotaStore } from './rota-store';

const DAY_MS = 86_400_000;
/** A fair share is counted over so many days back. */
const FAIR_SPAN_DAYS = 28;

/** Shares a room's open tasks out, whenever tasks, routines or the rota change. */
export class HolderAssignment {
  constructor(
    private readonly store: AssignmentStore,
    private readonly rota: RotaStore,
    private readonly rooms: Pick<RoomsService, 'roomOf'>,
    private readonly now: Clock,
  ) {}

  /**
   * Lets one transaction at a time change a room's care. Taken before any of its tasks is held, for sharing out may touch
   * all of them, and two that wait for each other's tasks would wait for ever.
   */
  hold(tx: Tx, roomId: string): Promise<void> {
    return this.rota.holdRoom(tx, roomId);
  }

  /**
   * Gives every open task to those who do it now; who held one and is there keeps it.
   *
   * @param tx - Of the change.
   * @param roomId - Which room.
   * @returns Ids of the tasks whose holders changed.
   */
  async share(tx: Tx, roomId: string): Promise<string[]> {
    await this.hold(tx, roomId);
    const room = await this.rooms.roomOf(tx, roomId);
    if (room === null) return [];
    const now = this.now().getTime();
    const today = dayBounds(now, room.timeZone).date;
    const open = (await this.store.openTasks(tx, roomId)).map(({ dueOn, how, personIds, ...task }) => ({
      ...task,
      day: dueOn < today ? today : dueOn,
      who: { how, personIds },
    }));
    const rota = await this.rota.rota(tx, roomId, today);
    const loads = await this.store.minutesSince(tx, roomId, new Date(now - FAIR_SPAN_DAYS * DAY_MS));
    const before = new Map(open.map((task) => [task.id, heldBy(task)]));
    const changed = assignHolders(open, rota, loads).filter(
      (given) => !isDeepStrictEqual(before.get(given.taskId), heldBy(given)),
    );
    if (changed.length > 0) await this.store.save(tx, changed);
    return changed.map(({ taskId }) => taskId);
  }
}

function heldBy({ holders, isByHand }: { readonly holders: readonly string[]; readonly isByHand: boolean }) {
  return { holders: [...holders].sort(), isByHand };
}
