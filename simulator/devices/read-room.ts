import { readFile } from 'node:fs/promises';
import { simulatedRoom, type SimulatedRoom } from '@shared/contracts/simulation';
import { Problem } from '../process/run-process';

/**
 * Reads the file that tells which room to play.
 *
 * @param path - As in LAMPMEADOW_DEVICES_FILE.
 * @throws {@link Problem} when there is no such file or it does not describe a room.
 */
export async function readRoom(path: string): Promise<SimulatedRoom> {
  const text = await readFile(path, 'utf8').catch((error: NodeJS.ErrnoException) => {
    if (error.code !== 'ENOENT') throw error;
    throw new Problem(
      `There is no device file ${path}; the server writes it when it fills the demonstration.`,
    );
  });
  const parsed = simulatedRoom.safeParse(parseJson(text));
  if (parsed.success) return parsed.data;
  const reasons = parsed.error.issues.map(({ path: field, message }) => `${field.join('.')}: ${message}`);
  throw new Problem(`The device file ${path} cannot be used: ${reasons.join('; ')}.`);
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return undefined; // The schema then says that no room is there.
  }
}
