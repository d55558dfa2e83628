import type { CareDays } from '@shared/contracts/care';
import type { CareDeedKind, KeptDeed } from '../care/care-deed';
import { account, membership } from './account-builder';
import { boardAt, task } from './board-builder';

/** Today's and tomorrow's care of the invented room: one task. */
export function careDays(changes: Partial<CareDays> = {}): CareDays {
  const { roomId, roomName, timeZone } = membership();
  return {
    roomId,
    roomName,
    timeZone,
    at: boardAt,
    today: '2026-12-01',
    tomorrow: '2026-12-02',
    tasks: [task()],
    plantings: [],
    ...changes,
  };
}

/** A deed of the invented person that waits. */
export function keptDeed(order: number, deed: CareDeedKind, changes: Partial<KeptDeed> = {}): KeptDeed {
  const known = {
    ...deed,
    order,
    key: `key-${order}-invented`,
    personId: account().id,
    roomId: membership().roomId,
    title: 'Feed strawberries',
    at: boardAt,
    isTried: false,
    failures: 0,
    trouble: null,
  };
  return { ...known, ...changes } as KeptDeed;
}
