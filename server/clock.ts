/** Tells the time; tests pass one of their own. */
export type Clock = () => Date;

/** The time of this machine. */
export const systemClock: Clock = () => new Date();
