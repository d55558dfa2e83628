import { DateTime } from 'luxon';

/**
 * The invented room that the demonstration shows, as far as its devices and its physics go: the server fills its
 * database from it and tells the simulator to play it. Nothing here exists: place, people, devices and mishaps are made up.
 */

const TIME_ZONE = 'Europe/Dublin';
const READING_EVERY_SECONDS = 300;
/** Days of history before the demonstration is filled. */
export const HISTORY_DAYS = 100;

/** Days before the demonstration was filled on which something in its story happened, by the room's calendar. */
export const STORY_DAYS_BEFORE = {
  leekAndOnionSown: 10,
  peppersSown: 7,
  earlierPeppersSown: 68,
  earlierPeppersUp: 58,
  earlierPeppersMatOff: 54,
  earlierPeppersMovedOut: 16,
  shelfB4Emptied: 19,
  lampTimerFailed: 33,
  drySpellBegan: 24,
  drySpellEnded: 21,
  driftBegan: 46,
  driftEnded: 31,
} as const;
type StoryDay = keyof typeof STORY_DAYS_BEFORE;

/**
 * Tells the demonstration's room, its hundred days and its mishaps, relative to the instant at which it is filled.
 *
 * @param now - Instant of the filling [ms since 1970 UTC].
 * @returns Place, shelves with all their arrangements, devices without tokens, and the story, oldest first.
 */
export function kestrelLane(now: number) {
  const onDay = (day: StoryDay, clockTime: string): string =>
    roomTime(now, STORY_DAYS_BEFORE[day], clockTime);
  const ever = roomTime(now, HISTORY_DAYS + 60, '00:00');

  const standing = { isHeatMatOn: false, isCovered: false };
  const sowing = { isCovered: true, leafAreaM2: 0, lampPlan: [] };
  const seedlings = { ...standing, lampPlan: hours('07:00', '23:00'), leafAreaM2: 0.3 };
  return {
    timeZone: TIME_ZONE,
    latitudeDeg: 53.3,
    longitudeDeg: -6.4,
    shelves: [
      {
        ...place('A1', 0, 'inner'),
        lamp: led(now, 84, 370, 274),
        arrangements: [{ ...standing, from: ever, lampPlan: hours('06:00', '22:00'), leafAreaM2: 1.3 }],
      },
      {
        ...place('A2', 1, 'inner'),
        lamp: led(now, 70, 250, 274),
        arrangements: [{ ...standing, from: ever, lampPlan: hours('07:00', '21:00'), leafAreaM2: 1.1 }],
      },
      {
        ...place('A3', 2, 'inner'),
        lamp: led(now, 42, 160, 150),
        heatMatWatts: 40,
        arrangements: [
          { ...standing, from: ever, lampPlan: hours('07:00', '23:00'), leafAreaM2: 0.6 },
          { ...sowing, from: onDay('leekAndOnionSown', '10:00'), isHeatMatOn: false },
        ],
      },
      {
        ...place('A4', 3, 'inner'),
        lamp: led(now, 42, 160, 150),
        heatMatWatts: 40,
        arrangements: [
          { ...standing, from: ever, lampPlan: hours('07:00', '23:00'), leafAreaM2: 0.4 },
          { ...sowing, from: onDay('earlierPeppersSown', '11:00'), isHeatMatOn: true },
          // The cover came off and the lamps went on, but the mat was forgotten for days.
          { ...seedlings, from: onDay('earlierPeppersUp', '09:00'), isHeatMatOn: true },
          { ...seedlings, from: onDay('earlierPeppersMatOff', '18:30') },
          { ...standing, from: onDay('earlierPeppersMovedOut', '15:00'), lampPlan: [], leafAreaM2: 0 },
          { ...sowing, from: onDay('peppersSown', '11:00'), isHeatMatOn: true },
        ],
      },
      {
        ...place('B1', 0, 'cool'),
        lamp: led(now, 60, 370, 190),
        arrangements: [{ ...standing, from: ever, lampPlan: hours('06:00', '22:00'), leafAreaM2: 0.9 }],
      },
      {
        ...place('B2', 1, 'inner'),
        lamp: led(now, 66, 295, 320),
        arrangements: [{ ...standing, from: ever, lampPlan: hours('08:00', '20:00'), leafAreaM2: 0.7 }],
      },
      {
        ...place('B3', 2, 'cool'),
        lamp: {
          kind: 'fluorescent' as const,
          watts: 56,
          ppfdWhenNewUmolM2S: 165,
          luxPerUmol: 74,
          fittedAt: roomTime(now, 335, '12:00'),
        },
        arrangements: [{ ...standing, from: ever, lampPlan: hours('06:00', '20:00'), leafAreaM2: 0.7 }],
      },
      {
        ...place('B4', 3, 'cool'),
        lamp: led(now, 42, 160, 320),
        arrangements: [
          { ...standing, from: ever, lampPlan: hours('07:00', '21:00'), leafAreaM2: 0.5 },
          { ...standing, from: onDay('shelfB4Emptied', '16:00'), lampPlan: [], leafAreaM2: 0 },
        ],
      },
    ],
    devices: [
      device('Rack A, upper', [...sensors('A1', 'ppfd'), ...sensors('A2', 'illuminance')]),
      device('Rack A, lower', [
        ...sensors('A3', 'ppfd', 'rootZoneTemperature'),
        ...sensors('A4', 'ppfd', 'rootZoneTemperature'),
      ]),
      device('Rack B, upper', [...sensors('B1', 'ppfd'), ...sensors('B2', 'illuminance')]),
      device('Rack B, lower', [...sensors('B3', 'ppfd'), ...sensors('B4')]),
    ],
    story: [
      {
        scenario: 'sensor-drift' as const,
        shelf: 'A2',
        quantity: 'relativeHumidity' as const,
        from: onDay('driftBegan', '00:00'),
        to: onDay('driftEnded', '12:00'),
      },
      {
        scenario: 'timer-fails' as const,
        shelf: 'B1',
        lamp: 'lit' as const,
        from: onDay('lampTimerFailed', '21:30'),
        to: roomTime(now, STORY_DAYS_BEFORE.lampTimerFailed - 1, '08:20'),
      },
      {
        scenario: 'dry-spell' as const,
        shelf: 'B2',
        from: onDay('drySpellBegan', '11:00'),
        to: onDay('drySpellEnded', '17:00'),
      },
    ],
  };
}

function roomTime(now: number, daysBefore: number, clockTime: string): string {
  const date = DateTime.fromMillis(now, { zone: TIME_ZONE }).minus({ days: daysBefore }).toISODate() ?? '';
  return DateTime.fromISO(`${date}T${clockTime}`, { zone: TIME_ZONE }).toUTC().toJSDate().toISOString();
}

function place(label: string, tier: number, wall: 'inner' | 'cool') {
  return { label, tier, wall, heatMatWatts: null };
}

function hours(on: string, off: string) {
  return [{ on, off }];
}

function led(now: number, watts: number, ppfdWhenNewUmolM2S: number, ageDays: number) {
  const fittedAt = roomTime(now, ageDays, '12:00');
  return { kind: 'whiteLed' as const, watts, ppfdWhenNewUmolM2S, luxPerUmol: 68, fittedAt };
}

function device<Sensor>(name: string, carried: readonly Sensor[]) {
  return { name, sensors: [...carried] };
}

const KEY_ENDING = {
  airTemperature: 'air',
  rootZoneTemperature: 'root',
  relativeHumidity: 'humidity',
  ppfd: 'light',
  illuminance: 'lux',
} as const;

function sensors(shelf: string, ...more: ('ppfd' | 'illuminance' | 'rootZoneTemperature')[]) {
  return (['airTemperature', 'relativeHumidity', ...more] as const).map((quantity) => ({
    key: `${shelf.toLowerCase()}-${KEY_ENDING[quantity]}`,
    quantity,
    shelf,
    expectedIntervalSeconds: READING_EVERY_SECONDS,
  }));
}
