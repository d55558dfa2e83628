import { IsNull } from 'typeorm';
import type { OpenSwap } from '@shared/contracts/care';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { TaskSwapEntity } from './task-swap-entity';

/** An offer, held. */
export interface HeldSwap {
  readonly id: string;
  readonly taskId: string;
  readonly offeredById: string;
  readonly toPersonId: string | null;
}

/** Offers to hand tasks over. */
export class SwapsStore {
  /** Tasks of a room that somebody offers, by the day they are due. */
  async offeredTasks(tx: Tx, roomId: string): Promise<string[]> {
    const rows: { id: string }[] = await tx.query(
      `SELECT task.id FROM task_swap JOIN task ON task.id = task_swap.task_id
       WHERE task.room_id = $1 AND task_swap.ended_at IS NULL ORDER BY task.due_on, task_swap.offered_at, task.id`,
      [roomId],
    );
    return rows.map(({ id }) => id);
  }

  /** An open offer of a room with its task, both held; 404 when there is none such any more. */
  async lock(tx: Tx, roomId: string, swapId: string): Promise<HeldSwap> {
    const rows: HeldSwap[] = await tx.query(
      `SELECT swap.id, swap.task_id AS "taskId", swap.offered_by AS "offeredById", swap.to_person AS "toPersonId"
       FROM task_swap AS swap JOIN task ON task.id = swap.task_id
       WHERE task.room_id = $1 AND swap.id = $2 AND swap.ended_at IS NULL FOR UPDATE`,
      [roomId, swapId],
    );
    const row = rows[0];
    if (row === undefined) throw notFound('offer');
    return row;
  }

  /** Whether a task is on offer. */
  isOffered(tx: Tx, taskId: string): Promise<boolean> {
    return tx.existsBy(TaskSwapEntity, { taskId, endedAt: IsNull() });
  }

  /** Offers a task. */
  async offer(
    tx: Tx,
    offer: Pick<OpenSwap, 'toPersonId' | 'note' | 'offeredById'> & {
      readonly taskId: string;
      readonly at: Date;
    },
  ): Promise<void> {
    const { taskId, offeredById, toPersonId, note, at } = offer;
    await tx.insert(TaskSwapEntity, {
      taskId,
      offeredBy: offeredById,
      toPerson: toPersonId,
      note,
      offeredAt: at,
    });
  }

  /** Ends an offer: taken by somebody, or withdrawn. */
  async end(tx: Tx, swapId: string, takenBy: string | null, at: Date): Promise<void> {
    await tx.update(TaskSwapEntity, { id: swapId }, { takenBy, endedAt: at });
  }

  /** Ends the offer of a task that is settled otherwise, if there is one. */
  async settle(tx: Tx, taskId: string, at: Date): Promise<void> {
    await tx.update(TaskSwapEntity, { taskId, endedAt: IsNull() }, { endedAt: at });
  }
}
