import { Injectable, signal } from '@angular/core';

/** Whether changes arrive by themselves: for the first time soon, now, again soon, or not without a network. */
export type Liveness = 'connecting' | 'live' | 'reconnecting' | 'offline';

/** How the live connection stands. Apart from it, so that the frame can show it without loading socket.io. */
@Injectable({ providedIn: 'root' })
export class LiveState {
  private readonly current = signal<Liveness>('connecting');

  /** How it stands now. */
  readonly now = this.current.asReadonly();

  /** For the live connection alone. */
  set(liveness: Liveness): void {
    this.current.set(liveness);
  }
}
