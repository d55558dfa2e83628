import type { Tx } from '../../server/database/transactions';
import { RoutineEntity } from '../../server/care/routine-entity';
import { RoutinePersonEntity } from '../../server/care/routine-person-entity';
import { TaskEntity } from '../../server/care/task-entity';
import { TaskHolderEntity } from '../../server/care/task-holder-entity';
import { AbsenceEntity } from '../../server/rota/absence-entity';
import { TaskSwapEntity } from '../../server/rota/task-swap-entity';
import { aPerson } from './people';
import { aRoom } from './rooms';
import { nextNumber, stored } from './stored';

/** Watering, due on 15 April 2026; held by those who are named, as if somebody had chosen them. */
export async function aTask(
  tx: Tx,
  { personIds = [], ...overrides }: Partial<TaskEntity> & { readonly personIds?: readonly string[] } = {},
): Promise<TaskEntity> {
  const task = await stored(tx, TaskEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    kind: 'water',
    title: `Task ${nextNumber()}`,
    dueOn: '2026-04-15',
    isByHand: personIds.length > 0,
    outcome: overrides.doneAt === undefined || overrides.doneAt === null ? null : 'done',
    ...overrides,
  });
  for (const personId of personIds) await stored(tx, TaskHolderEntity, { taskId: task.id, personId });
  return task;
}

/** Watering every other day from 1 April 2026 on, by whoever is on duty or those who are named; no task planned yet. */
export async function aRoutine(
  tx: Tx,
  { personIds = [], ...overrides }: Partial<RoutineEntity> & { readonly personIds?: readonly string[] } = {},
): Promise<RoutineEntity> {
  const isCalendar = overrides.timing === undefined || overrides.timing === 'calendar';
  const routine = await stored(tx, RoutineEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    kind: 'water',
    title: `Routine ${nextNumber()}`,
    rule: isCalendar ? 'FREQ=DAILY;INTERVAL=2' : null,
    everyDays: isCalendar ? null : 3,
    startsOn: '2026-04-01',
    who: personIds.length === 0 ? 'onDuty' : personIds.length === 1 ? 'person' : 'inTurn',
    ...overrides,
  });
  for (const [position, personId] of personIds.entries()) {
    await stored(tx, RoutinePersonEntity, { routineId: routine.id, personId, position });
  }
  return routine;
}

/** Away from 20 to 24 April 2026. */
export async function anAbsence(tx: Tx, overrides: Partial<AbsenceEntity> = {}): Promise<AbsenceEntity> {
  return stored(tx, AbsenceEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    personId: overrides.personId ?? (await aPerson(tx)).id,
    fromDay: '2026-04-20',
    toDay: '2026-04-24',
    ...overrides,
  });
}

/** An offer of a task to anybody. */
export async function aSwap(tx: Tx, overrides: Partial<TaskSwapEntity> = {}): Promise<TaskSwapEntity> {
  return stored(tx, TaskSwapEntity, {
    taskId: overrides.taskId ?? (await aTask(tx)).id,
    offeredBy: overrides.offeredBy ?? (await aPerson(tx)).id,
    offeredAt: new Date('2026-04-14T09:00:00Z'),
    ...overrides,
  });
}
