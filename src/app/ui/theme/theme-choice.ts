import { DOCUMENT } from '@angular/common';
import { computed, DestroyRef, effect, inject, Injectable, signal } from '@angular/core';

/** The two views: a sheet by daylight, and a dark one for a dark room. */
export type Theme = 'day' | 'lamps-off';

const storageKey = 'lampmeadow.theme';
const darkSystem = '(prefers-color-scheme: dark)';

/**
 * Which view is shown: the one chosen on this device, else the system's. `assets/theme.js` does the same before the
 * first paint.
 */
@Injectable({ providedIn: 'root' })
export class ThemeChoice {
  private readonly document = inject(DOCUMENT);
  private readonly chosen = signal<Theme | null>(this.stored());
  private readonly isSystemDark = signal(false);

  /** What was chosen on this device; null follows the system. */
  readonly choice = this.chosen.asReadonly();

  /** The view shown now. */
  readonly shown = computed<Theme>(() => this.chosen() ?? (this.isSystemDark() ? 'lamps-off' : 'day'));

  constructor() {
    const system = matchMedia(darkSystem);
    const follow = (): void => this.isSystemDark.set(system.matches);
    follow();
    system.addEventListener('change', follow);
    inject(DestroyRef).onDestroy(() => system.removeEventListener('change', follow));

    effect(() => {
      const shown = this.shown();
      const { classList } = this.document.documentElement;
      classList.toggle('day', shown === 'day');
      classList.toggle('lamps-off', shown === 'lamps-off');
    });
  }

  /** Chooses a view for this device, or with null goes back to the system's. */
  choose(theme: Theme | null): void {
    this.chosen.set(theme);
    try {
      if (theme === null) localStorage.removeItem(storageKey);
      else localStorage.setItem(storageKey, theme);
    } catch {
      // Storage can be forbidden or full; the choice then lasts until the page is closed.
    }
  }

  /** Changes to the other view. */
  toggle(): void {
    this.choose(this.shown() === 'day' ? 'lamps-off' : 'day');
  }

  private stored(): Theme | null {
    try {
      const value = localStorage.getItem(storageKey);
      return value === 'day' || value === 'lamps-off' ? value : null;
    } catch {
      // Storage can be forbidden; the system's wish is a good answer then.
      return null;
    }
  }
}
