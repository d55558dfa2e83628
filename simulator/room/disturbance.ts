/** What is done to a shelf from outside its ordinary course. */
export interface ShelfDisturbance {
  /** `timer`: the lamp does what its plan says. */
  readonly lamp: 'timer' | 'dark' | 'lit';
  readonly isHeatMatStuckOn: boolean;
  /** Heat from a neighbouring radiator [W]. */
  readonly extraHeatW: number;
  /** Air straight from outdoors [g s⁻¹]. */
  readonly draughtGS: number;
}

/** What is done to the room and its shelves from outside their ordinary course. */
export interface RoomDisturbance {
  /** Air straight from outdoors into the room [g s⁻¹]. */
  readonly draughtGS: number;
  /** By shelf label; shelves that are not named go on undisturbed. */
  readonly shelves: ReadonlyMap<string, ShelfDisturbance>;
}

/** A shelf left alone. */
export const calmShelf: ShelfDisturbance = {
  lamp: 'timer',
  isHeatMatStuckOn: false,
  extraHeatW: 0,
  draughtGS: 0,
};

/** A room left alone. */
export const calmRoom: RoomDisturbance = { draughtGS: 0, shelves: new Map() };
