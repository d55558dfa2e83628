/** A place in the navigation. */
export interface Destination {
  readonly label: string;
  /** Name of a Material symbol. */
  readonly icon: string;
  /** Where it leads, from the root: "/alerts". */
  readonly link: string;
}

/** One of the rooms that a person is a member of. */
export interface RoomChoice {
  readonly id: string;
  readonly name: string;
}

/** How the live connection to the room stands. */
export type Connection = 'live' | 'reconnecting' | 'offline';
