import { effect, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { SwUpdate } from '@angular/service-worker';
import { LiveState } from './live-state';

/** Whether a newer version of the application waits on this device to be shown. */
@Injectable({ providedIn: 'root' })
export class AppUpdate {
  private readonly updates = inject(SwUpdate);
  private readonly ready = signal(false);

  /** A newer version is on this device; a reload shows it. */
  readonly isReady = this.ready.asReadonly();

  constructor() {
    if (!this.updates.isEnabled) return;
    this.updates.versionUpdates.pipe(takeUntilDestroyed()).subscribe(({ type }) => {
      if (type === 'VERSION_READY') this.ready.set(true);
    });
    // What the browser threw away to save space only a reload brings back.
    this.updates.unrecoverable.pipe(takeUntilDestroyed()).subscribe(() => this.ready.set(true));
    const state = inject(LiveState);
    effect(() => {
      // A server that was away may have come back with a newer application.
      if (state.now() === 'live') void this.check();
    });
  }

  /** Loads the page anew, which shows the newest version that is here. */
  reload(): void {
    location.reload();
  }

  private async check(): Promise<void> {
    try {
      await this.updates.checkForUpdate();
    } catch {
      // Without an answer it is asked for again with the next connection.
    }
  }
}
