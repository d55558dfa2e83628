import type { Tx } from '../../server/database/transactions';
import { SowingChoiceEntity } from '../../server/sowing/sowing-choice-entity';
import { aRoom } from './rooms';
import { stored } from './stored';

/** Leek on a room's sowing calendar, sown once. */
export async function aSowingChoice(
  tx: Tx,
  overrides: Partial<SowingChoiceEntity> = {},
): Promise<SowingChoiceEntity> {
  return stored(tx, SowingChoiceEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    cropId: 'leek',
    ...overrides,
  });
}
