import type { TaskPlanningService } from '../care/task-planning-service';
import type { Clock } from '../clock';
import type { Config } from '../config';
import type { Transactions } from '../database/transactions';
import { whenAlone } from '../jobs/single-runner';
import { demonstrationPassword, demonstrationPeople } from './demonstration-content';
import { DemonstrationService } from './demonstration-service';
import { DemonstrationStore } from './demonstration-store';

/**
 * Fills the demonstration room once, where the settings ask for it.
 *
 * @param transactions - Of the migrated database.
 * @param planning - Makes the tasks of its routines.
 * @param config - Says whether, and where the simulator reads its room.
 * @param now - The present.
 * @returns The room's id; null without a demonstration.
 */
export async function fillDemonstration(
  transactions: Transactions,
  planning: TaskPlanningService,
  config: Config,
  now: Clock,
): Promise<string | null> {
  const { devicesFile } = config;
  if (!config.isDemonstration || devicesFile === null) return null;
  const service = new DemonstrationService(
    transactions,
    new DemonstrationStore(),
    async (tx, roomId) => void (await planning.planRoom(tx, roomId)),
    now,
  );
  let room: string | null = null;
  // Of several processes that start together one fills; the others find the room there.
  while (
    !(await whenAlone(transactions, 'demonstration', async () => {
      room = await service.fill(devicesFile);
    }))
  ) {
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  return room;
}

/** How to sign in to the demonstration, for whoever started it. */
export function demonstrationNotes(): string[] {
  const shown = demonstrationPeople.filter(
    ({ role }, index) => demonstrationPeople.findIndex((person) => person.role === role) === index,
  );
  return [
    'Sign in to the invented demonstration room as',
    ...shown.map(({ email, role }) => `  ${email.padEnd(20)} (${role})`),
    `  password: ${demonstrationPassword}`,
  ];
}
