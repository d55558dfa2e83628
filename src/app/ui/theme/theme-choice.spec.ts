import { TestBed } from '@angular/core/testing';
import { ThemeChoice } from './theme-choice';

describe('the choice of view', () => {
  const page = document.documentElement.classList;
  const key = 'lampmeadow.theme';

  afterEach(() => {
    localStorage.clear();
    jest.restoreAllMocks();
  });

  function systemIs(dark: boolean): { becomes: (dark: boolean) => void } {
    const media = Object.assign(new EventTarget(), { matches: dark });
    jest.spyOn(globalThis, 'matchMedia').mockReturnValue(media as unknown as MediaQueryList);
    return {
      becomes: (next) => {
        media.matches = next;
        media.dispatchEvent(new Event('change'));
      },
    };
  }

  it('follows the system when nothing was chosen, also when the system changes', () => {
    const system = systemIs(false);
    const theme = TestBed.inject(ThemeChoice);
    TestBed.tick();
    expect(theme.shown()).toBe('day');
    expect(page.contains('day')).toBe(true);

    system.becomes(true);
    TestBed.tick();
    expect(theme.shown()).toBe('lamps-off');
    expect(page.contains('lamps-off')).toBe(true);
    expect(page.contains('day')).toBe(false);
  });

  it('that was made on this device outweighs the system and is kept', () => {
    systemIs(true);
    const theme = TestBed.inject(ThemeChoice);
    theme.toggle();
    expect(theme.shown()).toBe('day');
    expect(localStorage.getItem(key)).toBe('day');
  });

  it('given back to the system leaves nothing behind', () => {
    localStorage.setItem(key, 'lamps-off');
    systemIs(false);
    const theme = TestBed.inject(ThemeChoice);
    expect(theme.shown()).toBe('lamps-off');
    theme.choose(null);
    expect(theme.shown()).toBe('day');
    expect(localStorage.getItem(key)).toBeNull();
  });

  it('lasts for the visit when storage is forbidden', () => {
    systemIs(false);
    jest.spyOn(Storage.prototype, 'setItem').mockImplementation(() => {
      throw new Error('forbidden');
    });
    const theme = TestBed.inject(ThemeChoice);
    theme.choose('lamps-off');
    expect(theme.shown()).toBe('lamps-off');
  });
});
