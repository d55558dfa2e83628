import type { Theme } from '@shared/contracts/people';

/** A view of one device: by day, with the lamps off, or null to follow the system. */
export type DeviceView = 'day' | 'lamps-off' | null;

/** The view that a person's account asks for. */
export function viewOf(theme: Theme): DeviceView {
  if (theme === 'system') return null;
  return theme === 'day' ? 'day' : 'lamps-off';
}

/** The inverse of {@link viewOf}. */
export function themeOf(view: DeviceView): Theme {
  if (view === null) return 'system';
  return view === 'day' ? 'day' : 'lampsOff';
}
