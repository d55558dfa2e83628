/** Turns real time into the room's, which may run faster and may have begun at another time. */
export class RoomTime {
  private readonly realStartMs: number;

  /**
   * @param startMs - The room's time at the beginning [ms since 1970 UTC].
   * @param speed - Room seconds per real second, above 0.
   * @param realNow - The real clock.
   */
  constructor(
    private readonly startMs: number,
    readonly speed: number,
    private readonly realNow: () => number,
  ) {
    this.realStartMs = realNow();
  }

  /** The room's time now [ms since 1970 UTC]. */
  now(): number {
    return this.startMs + (this.realNow() - this.realStartMs) * this.speed;
  }
}
