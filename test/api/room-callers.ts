import { roles, type Role } from '@shared/contracts/people';
import type { RoomEntity } from '../../server/rooms/room-entity';
import { aMember, aPerson } from '../builders/people';
import { aRoom } from '../builders/rooms';
import { Caller } from './caller';
import type { TestApplication } from './test-application';

/** A room with a member of each role, signed in. */
export interface StaffedRoom extends Readonly<Record<Role, Caller>> {
  readonly room: RoomEntity;
  readonly people: Readonly<Record<Role, { readonly id: string; readonly name: string }>>;
  /** The path of the room, for what follows it. */
  readonly path: string;
}

/**
 * Makes a room and signs a member of each role in.
 *
 * @param application - Where.
 * @param overrides - Of the room.
 * @returns The room and its people.
 */
export async function aStaffedRoom(
  application: TestApplication,
  overrides: Partial<RoomEntity> = {},
): Promise<StaffedRoom> {
  const { tx, express } = application;
  const room = await aRoom(tx, overrides);
  const entries = await Promise.all(
    roles.map(async (role) => {
      const person = await aPerson(tx);
      await aMember(tx, { roomId: room.id, personId: person.id, role });
      return { role, person, caller: await Caller.signedIn(express, person) };
    }),
  );
  const by = <T>(pick: (entry: (typeof entries)[number]) => T): Record<Role, T> =>
    Object.fromEntries(entries.map((entry) => [entry.role, pick(entry)])) as Record<Role, T>;
  return {
    room,
    path: `/rooms/${room.id}`,
    people: by(({ person }) => person),
    ...by(({ caller }) => caller),
  };
}
