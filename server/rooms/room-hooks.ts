import type { Quantity } from '@shared/climate/quantity';
import type { Tx } from '../database/transactions';

/** What other areas keep that a change of the room makes out of date; called in the transaction of the change. */
export interface RoomHooks {
  /** The room's days are other days now. */
  onTimeZoneChanged(tx: Tx, roomId: string, timeZone: string): Promise<void>;
  /** The shelf wants something else of a quantity from now on, or nothing any more. */
  onRangeChanged(tx: Tx, shelfId: string, quantity: Quantity): Promise<void>;
  /** The shelf wants more or less light a day from now on, or none any more. */
  onWantedLightChanged(tx: Tx, shelfId: string): Promise<void>;
  /** What is computed of the shelf's leaves is computed otherwise now. */
  onLeafOffsetChanged(tx: Tx, shelfId: string): Promise<void>;
}
