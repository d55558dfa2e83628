import type { Tx } from '../../server/database/transactions';
import { RoutineEntity } from '../../server/care/routine-entity';
import { TaskEntity } from '../../server/care/task-entity';
import { aRoom } from './rooms';
import { nextNumber, stored } from './stored';

/** Watering, due on 15 April 2026. */
export async function aTask(tx: Tx, overrides: Partial<TaskEntity> = {}): Promise<TaskEntity> {
  return stored(tx, TaskEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    kind: 'water',
    title: `Task ${nextNumber()}`,
    dueOn: '2026-04-15',
    ...overrides,
  });
}

/** Watering every other day from 1 April 2026 on, no task planned yet. */
export async function aRoutine(tx: Tx, overrides: Partial<RoutineEntity> = {}): Promise<RoutineEntity> {
  return stored(tx, RoutineEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    kind: 'water',
    title: `Routine ${nextNumber()}`,
    rule: 'FREQ=DAILY;INTERVAL=2',
    startsOn: '2026-04-01',
    ...overrides,
  });
}
