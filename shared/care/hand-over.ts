/** Why a task can't change hands. */
export type HandOverRefusal = 'notHeld' | 'holdsIt' | 'notForThem';

/**
 * Whether somebody may take a task that another one offers.
 *
 * @param holders - Who holds it.
 * @param offer - By whom, and for whom; null for anybody.
 * @param takerId - Who would take it.
 * @returns Null when they may; else why not: who offers it holds it no more, the taker does already, or it is for
 *   somebody else.
 */
export function handOverRefusal(
  holders: readonly string[],
  offer: { readonly offeredById: string; readonly toPersonId: string | null },
  takerId: string,
): HandOverRefusal | null {
  if (!holders.includes(offer.offeredById)) return 'notHeld';
  if (holders.includes(takerId)) return 'holdsIt';
  return offer.toPersonId === null || offer.toPersonId === takerId ? null : 'notForThem';
}

/**
 * The holders of a task after it changed hands: one for another, and whoever else holds it stays.
 *
 * @param holders - Before; the giver among them.
 * @param from - Who gives it.
 * @param to - Who takes it.
 */
export function handedOver(holders: readonly string[], from: string, to: string): string[] {
  return holders.map((personId) => (personId === from ? to : personId));
}
