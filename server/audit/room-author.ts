import type { RouteContext } from '../http/route';

/** Who changes something in which room. */
export interface RoomAuthor {
  readonly roomId: string;
  readonly personId: string;
}

/**
 * Who is behind a request inside a room.
 *
 * @param context - Of a route whose access is a role.
 * @returns The room and the person.
 */
export function authorOf({
  room,
  person,
}: Pick<RouteContext<never, never, never>, 'room' | 'person'>): RoomAuthor {
  return { roomId: room.id, personId: person.id };
}
