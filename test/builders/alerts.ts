import { AlertDeedEntity } from '../../server/alerts/alert-deed-entity';
import { AlertEntity } from '../../server/alerts/alert-entity';
import { AlertWatchEntity } from '../../server/alerts/alert-watch-entity';
import type { Tx } from '../../server/database/transactions';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { aShelf } from './rooms';
import { stored } from './stored';

/** A shelf that has been too dry since the morning of 15 April 2026, by its own rule unless another one's is given. */
export async function anAlert(tx: Tx, overrides: Partial<AlertEntity> = {}): Promise<AlertEntity> {
  const shelfId = overrides.shelfId ?? (await aShelf(tx)).id;
  const { roomId } = await tx.findOneByOrFail(ShelfEntity, { id: shelfId });
  const quantity = overrides.quantity ?? 'vapourPressureDeficit';
  const kind = overrides.kind ?? 'aboveRange';
  const watchId =
    overrides.watchId ?? (await stored(tx, AlertWatchEntity, { shelfId, quantity, kind, state: {} })).id;
  return stored(tx, AlertEntity, {
    watchId,
    roomId,
    shelfId,
    quantity,
    kind,
    urgency: 'lookToday',
    beganAt: new Date('2026-04-15T06:00:00Z'),
    openedAt: new Date('2026-04-15T06:30:00Z'),
    peakAt: new Date('2026-04-15T08:00:00Z'),
    peakValue: 1.8,
    peakExcess: 0.4,
    peakLimit: 1.4,
    ...overrides,
  });
}

/** A note that somebody looked at an alert. */
export async function anAlertDeed(
  tx: Tx,
  overrides: Partial<AlertDeedEntity> = {},
): Promise<AlertDeedEntity> {
  return stored(tx, AlertDeedEntity, {
    alertId: overrides.alertId ?? (await anAlert(tx)).id,
    at: new Date('2026-04-15T08:10:00Z'),
    text: 'Vent opened',
    ...overrides,
  });
}
