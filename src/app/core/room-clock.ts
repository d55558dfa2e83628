import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';

const tickMs = 1000;
const calmMs = 10_000;

/** The server's clock on this device, whose own may be wrong. */
@Injectable({ providedIn: 'root' })
export class RoomClock {
  private offsetMs = 0;
  private readonly ticking = signal(Date.now());

  /** Now by the server's clock, every second [ms since 1970 UTC]. */
  readonly now = this.ticking.asReadonly();

  /** The same every ten seconds, for what need not change more often. */
  readonly calmNow = computed(() => Math.floor(this.ticking() / calmMs) * calmMs);

  constructor() {
    const timer = setInterval(() => this.tick(), tickMs);
    inject(DestroyRef).onDestroy(() => clearInterval(timer));
  }

  /**
   * Sets the clock by an answer of the server.
   *
   * @param serverAt - The server's time as it answered, ISO 8601. The way here is not counted: it is far below the
   * second that the clock shows.
   */
  setBy(serverAt: string): void {
    this.offsetMs = Date.parse(serverAt) - Date.now();
    this.tick();
  }

  private tick(): void {
    this.ticking.set(Date.now() + this.offsetMs);
  }
}
