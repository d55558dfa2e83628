/**
 * Something remembered on this device.
 *
 * @param key - Its name, beginning with `lampmeadow.`.
 * @returns Null when nothing is stored, or storage is forbidden.
 */
export function readStored(key: string): string | null {
  try {
    return localStorage.getItem(key);
  } catch {
    // Storage can be forbidden; then nothing is remembered.
    return null;
  }
}

/** Remembers something on this device, where that is allowed. */
export function store(key: string, value: string): void {
  try {
    localStorage.setItem(key, value);
  } catch {
    // Storage can be forbidden or full; what is remembered is a convenience only.
  }
}

/** Forgets something on this device. */
export function forget(key: string): void {
  try {
    localStorage.removeItem(key);
  } catch {
    // Storage can be forbidden; then there is nothing to forget.
  }
}
