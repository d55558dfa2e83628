import type { DeedStore, KeptDeed, Trouble } from './care-deed';

/** What became of sending a deed. */
export type Delivery =
  /** The server has it. */
  | { readonly is: 'taken' }
  /** Nobody answered, or not yet: the same again later. */
  | { readonly is: 'unanswered'; readonly retryAfterS: number | null }
  /** The server could not finish it, for a reason of its own. */
  | { readonly is: 'failed'; readonly trouble: Trouble }
  | { readonly is: 'refused'; readonly trouble: Trouble };

/** Whether everything is delivered, or what is left waits. */
export interface Round {
  readonly isThrough: boolean;
  /** Seconds after which trying again may help; null when nobody said. */
  readonly retryAfterS: number | null;
}

/** A deed that the server fails at so often is shown, lest it hold up all others for ever. */
export const mostFailures = 5;

/**
 * Sends a person's deeds one after another, the oldest first, until none waits or one must wait. A deed leaves the store
 * only once the server has it, so whatever ends this early sends it again under the same key.
 *
 * @param store - Where they are kept; asked anew for each, because more may come.
 * @param personId - Whose.
 * @param send - Sends one.
 * @returns Whether all that waited is delivered.
 */
export async function deliverInOrder(
  store: DeedStore,
  personId: string,
  send: (deed: KeptDeed) => Promise<Delivery>,
): Promise<Round> {
  for (;;) {
    const deeds = await store.of(personId);
    const next = deeds.find(({ trouble }) => trouble === null);
    if (next === undefined) return { isThrough: true, retryAfterS: null };
    if (!next.isTried) await store.change({ ...next, isTried: true });
    const delivery = await send(next);
    if (delivery.is === 'taken') {
      await store.remove(next.order);
    } else if (delivery.is === 'refused') {
      await setAside(store, next, delivery.trouble, await store.of(personId));
    } else if (delivery.is === 'failed' && next.failures + 1 >= mostFailures) {
      await setAside(store, next, delivery.trouble, await store.of(personId));
    } else {
      if (delivery.is === 'failed')
        await store.change({ ...next, isTried: true, failures: next.failures + 1 });
      return {
        isThrough: false,
        retryAfterS: delivery.is === 'unanswered' ? delivery.retryAfterS : null,
      };
    }
  }
}

/**
 * Keeps a deed apart with its trouble. A tick that the person has meanwhile taken back goes together with the taking
 * back: sent alone, that would undo what somebody else did.
 */
async function setAside(
  store: DeedStore,
  deed: KeptDeed,
  trouble: Trouble,
  deeds: readonly KeptDeed[],
): Promise<void> {
  const takingBack =
    deed.kind === 'close'
      ? deeds.find((one) => one.kind === 'reopen' && one.taskId === deed.taskId && one.order > deed.order)
      : undefined;
  if (takingBack === undefined) {
    await store.change({ ...deed, isTried: true, trouble });
    return;
  }
  await store.remove(takingBack.order);
  await store.remove(deed.order);
}
