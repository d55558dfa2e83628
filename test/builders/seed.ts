import type { Tx } from '../../server/database/transactions';
import { GerminationTestEntity } from '../../server/seed/germination-test-entity';
import { SeedLotEntity } from '../../server/seed/seed-lot-entity';
import { aRoom } from './rooms';
import { stored } from './stored';

/** Two hundred leek seeds packed in 2025. */
export async function aSeedLot(tx: Tx, overrides: Partial<SeedLotEntity> = {}): Promise<SeedLotEntity> {
  return stored(tx, SeedLotEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    cropId: 'leek',
    packedYear: 2025,
    unit: 'seeds',
    amount: 200,
    ...overrides,
  });
}

/** Twenty seeds put on paper on 1 April 2026; nothing was taken from the lot for them. */
export async function aGerminationTest(
  tx: Tx,
  overrides: Partial<GerminationTestEntity> = {},
): Promise<GerminationTestEntity> {
  return stored(tx, GerminationTestEntity, {
    lotId: overrides.lotId ?? (await aSeedLot(tx)).id,
    startedOn: '2026-04-01',
    seeds: 20,
    ...overrides,
  });
}
