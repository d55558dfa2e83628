import { handedOver, handOverRefusal, type HandOverRefusal } from '@shared/care/hand-over';
import type { Task } from '@shared/contracts/care';
import type { SwapOffer } from '@shared/contracts/care-rota';
import { roleSuffices, type Role } from '@shared/contracts/people';
import type { RoomAuthor } from '../audit/room-author';
import type { CarePlaces } from '../care/care-places';
import { requireOpen } from '../care/tasks-service';
import type { TasksStore } from '../care/tasks-store';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { conflict, invalidField, RequestProblem } from '../http/request-problem';
import type { LiveFeed } from '../live/live-feed';
import type { SwapsStore } from './swaps-store';

/** Tells people of offers. */
export interface SwapTeller {
  /** To whom it is offered: one, or all who help. */
  tellOffered(tx: Tx, roomId: string, offer: SwapOffer): Promise<void>;
  /** Both: who gave it, and who took it. */
  tellTaken(tx: Tx, roomId: string, offer: SwapOffer, takenBy: string): Promise<void>;
}

/** What {@link SwapsService} works with. */
export interface SwapsParts {
  readonly transactions: Transactions;
  readonly swaps: SwapsStore;
  readonly tasks: TasksStore;
  readonly places: Pick<CarePlaces, 'requireCarers'>;
  readonly teller: SwapTeller;
  readonly feed: LiveFeed;
  readonly now: Clock;
}

const refusals: Readonly<Record<HandOverRefusal, string>> = {
  notHeld: 'Whoever offered this holds it no more. Nothing was changed.',
  holdsIt: 'You hold this already. Nothing was changed.',
  notForThem: 'This was offered to somebody else. Nothing was changed.',
};

/** Lets people hand tasks over: one offers, another takes, both are told. */
export class SwapsService {
  constructor(private readonly parts: SwapsParts) {}

  /** Offers that nobody has taken, soonest due first. */
  async open(roomId: string): Promise<SwapOffer[]> {
    const { transactions, swaps, tasks } = this.parts;
    const tx = transactions.plain;
    const offered = await tasks.some(tx, roomId, await swaps.offeredTasks(tx, roomId));
    return offered.flatMap((task) => (task.swap === null ? [] : [{ ...task.swap, task }]));
  }

  /**
   * Offers a task to one member, or to all who help.
   *
   * @param by - Who holds it.
   * @param taskId - Which.
   * @param offer - To whom, and a word about it.
   * @returns The offer.
   * @throws {@link RequestProblem} 403 for somebody else's task, 409 for one that is closed or offered already, 422 for
   *   somebody who can't do care.
   */
  async offer(
    by: RoomAuthor,
    taskId: string,
    { toPersonId, note }: { readonly toPersonId: string | null; readonly note: string },
  ): Promise<SwapOffer> {
    const { transactions, swaps, tasks, places, teller, feed, now } = this.parts;
    if (toPersonId === by.personId) throw invalidField('body.toPersonId', 'is yourself');
    if (toPersonId !== null) await places.requireCarers(by.roomId, [toPersonId], 'body.toPersonId');
    const offered = await transactions.run(async (tx) => {
      requireOpen(await tasks.lock(tx, by.roomId, taskId));
      const holders = await tasks.holders(tx, taskId);
      if (!holders.includes(by.personId)) {
        throw new RequestProblem(403, 'NOT_YOURS', 'You can offer what you hold yourself.');
      }
      if (toPersonId !== null && holders.includes(toPersonId)) {
        throw invalidField('body.toPersonId', 'holds this already');
      }
      if (await swaps.isOffered(tx, taskId)) {
        throw conflict('OFFERED_ALREADY', 'This is on offer already. Withdraw that offer first.');
      }
      await swaps.offer(tx, { taskId, offeredById: by.personId, toPersonId, note, at: now() });
      const task = await tasks.task(tx, by.roomId, taskId);
      if (task.swap === null) throw new Error(`the offer of ${taskId} was not stored`);
      const result = { ...task.swap, task };
      await teller.tellOffered(tx, by.roomId, result);
      return result;
    });
    feed.publish(by.roomId, 'task:changed', offered.task);
    return offered;
  }

  /** Takes an offered task; both are told. 409 where it can't change hands any more. */
  async take(by: RoomAuthor, swapId: string): Promise<Task> {
    const { transactions, swaps, tasks, teller, feed, now } = this.parts;
    const task = await transactions.run(async (tx) => {
      const held = await swaps.lock(tx, by.roomId, swapId);
      const holders = await tasks.holders(tx, held.taskId);
      const refusal = handOverRefusal(holders, held, by.personId);
      if (refusal !== null) throw conflict('NOT_TO_TAKE', refusals[refusal]);
      const before = await tasks.task(tx, by.roomId, held.taskId);
      await swaps.end(tx, swapId, by.personId, now());
      await tasks.hold(tx, held.taskId, handedOver(holders, held.offeredById, by.personId), true);
      const after = await tasks.task(tx, by.roomId, held.taskId);
      if (before.swap !== null) {
        await teller.tellTaken(tx, by.roomId, { ...before.swap, task: after }, by.personId);
      }
      return after;
    });
    feed.publish(by.roomId, 'task:changed', task);
    return task;
  }

  /** Withdraws an offer; a helper their own. The task stays with who offered it. */
  async withdraw(by: RoomAuthor & { readonly role: Role }, swapId: string): Promise<void> {
    const { transactions, swaps, tasks, feed, now } = this.parts;
    const task = await transactions.run(async (tx) => {
      const held = await swaps.lock(tx, by.roomId, swapId);
      if (held.offeredById !== by.personId && !roleSuffices(by.role, 'grower')) {
        throw new RequestProblem(403, 'NOT_YOURS', 'Somebody else offered this; ask them or a grower.');
      }
      await swaps.end(tx, swapId, null, now());
      return tasks.task(tx, by.roomId, held.taskId);
    });
    feed.publish(by.roomId, 'task:changed', task);
  }
}
