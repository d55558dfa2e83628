import type { FileProfile } from '@shared/contracts/logger-file-profiles';
import { violatedConstraint } from '../database/violated-constraint';
import type { Tx } from '../database/transactions';
import { conflict } from '../http/request-problem';
import type { LoggerFileEntity } from './logger-file-entity';
import { LoggerFileProfileEntity } from './logger-file-profile-entity';
import type { SeriesMatches } from './series-matches';

/** Queries over profiles: how files of one layout are read and where their series go. */
export class ProfileStore {
  /** The room's profiles, the last used first; with a fingerprint only those of that layout. */
  list(tx: Tx, roomId: string, fingerprint?: string): Promise<LoggerFileProfileEntity[]> {
    const where = fingerprint === undefined ? { roomId } : { roomId, fingerprint };
    return tx.find(LoggerFileProfileEntity, { where, order: { usedAt: 'DESC', id: 'ASC' } });
  }

  /** One profile; null where the room has none. */
  find(
    tx: Tx,
    roomId: string,
    of: { id: string } | { name: string },
  ): Promise<LoggerFileProfileEntity | null> {
    return tx.findOneBy(LoggerFileProfileEntity, { roomId, ...of });
  }

  /**
   * Keeps how a file was read: in its own profile, or in a new one.
   *
   * @param name - For a new profile; one that has the name already is overwritten.
   * @returns The profile.
   */
  async keep(
    tx: Tx,
    { roomId, fingerprint, shape, profileId }: LoggerFileEntity,
    matches: SeriesMatches,
    name: string,
  ): Promise<string> {
    const kept = { fingerprint, shape, matches, usedAt: new Date() };
    if (profileId !== null) {
      const { affected } = await tx.update(LoggerFileProfileEntity, { id: profileId, roomId }, kept);
      if (affected === 1) return profileId;
    }
    await tx.upsert(LoggerFileProfileEntity, { roomId, name, ...kept }, ['roomId', 'name']);
    const { id } = await tx.findOneByOrFail(LoggerFileProfileEntity, { roomId, name });
    return id;
  }

  /**
   * Gives a profile another name.
   *
   * @returns The profile, null where the room has none.
   * @throws RequestProblem 409 when another one has the name.
   */
  async rename(tx: Tx, roomId: string, id: string, name: string): Promise<LoggerFileProfileEntity | null> {
    try {
      await tx.update(LoggerFileProfileEntity, { id, roomId }, { name });
    } catch (error) {
      if (violatedConstraint(error) !== 'logger_file_profile_room_name_key') throw error;
      throw conflict('NAME_TAKEN', 'Another profile of this room has that name.');
    }
    return this.find(tx, roomId, { id });
  }

  /** Forgets a profile; false where the room has none. */
  async remove(tx: Tx, roomId: string, id: string): Promise<boolean> {
    const { affected } = await tx.delete(LoggerFileProfileEntity, { id, roomId });
    return affected === 1;
  }
}

/**
 * A profile as people see it.
 *
 * @param profile - As it is kept.
 */
export function fileProfileOf({ id, name, usedAt }: LoggerFileProfileEntity): FileProfile {
  return { id, name, usedAt: usedAt.toISOString() };
}
