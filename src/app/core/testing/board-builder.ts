import type { Alert } from '@shared/contracts/alerts';
import type { Board, BoardShelf, LampDay, Measure, PlantingSummary } from '@shared/contracts/board';
import type { Task } from '@shared/contracts/care';
import type { Quantity } from '@shared/climate/quantity';
import { membership } from './account-builder';

/** The instant of every invented board: Tuesday 1 December, 14:20 in Dublin. */
export const boardAt = '2026-12-01T14:20:00Z';

/** An invented id, told apart by its number. */
export function inventedId(number: number): string {
  return `0b6f6c0e-0000-4000-8000-${number.toString(16).padStart(12, '0')}`;
}

/** A reading four seconds old, within its wanted range. */
export function measure(quantity: Quantity, value: number, changes: Partial<Measure> = {}): Measure {
  return {
    quantity,
    value,
    at: '2026-12-01T14:19:56Z',
    suspect: false,
    expectedIntervalS: 60,
    wanted: null,
    ...changes,
  };
}

/** Lamps planned from 6 to 22 and lit since 6. */
export function lampDay(changes: Partial<LampDay> = {}): LampDay {
  return {
    hasLamp: true,
    lit: true,
    planned: [{ from: '2026-12-01T06:00:00Z', to: '2026-12-01T22:00:00Z' }],
    measured: [{ from: '2026-12-01T06:00:00Z', to: boardAt }],
    measuredHours: 8.33,
    dliMolM2D: 7.1,
    ...changes,
  };
}

/** Four tomato plants, 274 days old. */
export function planting(changes: Partial<PlantingSummary> = {}): PlantingSummary {
  return {
    id: inventedId(500),
    crop: 'Dwarf tomato',
    variety: null,
    habit: 'fruiting',
    count: 4,
    stage: 'fruiting',
    startedOn: '2026-03-02',
    stageSince: '2026-05-20',
    ...changes,
  };
}

/** Shelf A1 with tomatoes under lit lamps, too warm. */
export function boardShelf(changes: Partial<BoardShelf> = {}): BoardShelf {
  const id = changes.id ?? inventedId(1);
  return {
    id,
    label: 'A1',
    heatMatOn: null,
    plantings: [planting()],
    sowings: [],
    advice: null,
    now: {
      shelfId: id,
      measures: [
        measure('airTemperature', 28.3, { wanted: { low: 20, high: 26 } }),
        measure('relativeHumidity', 58, { wanted: { low: 50, high: 70 } }),
        measure('vapourPressureDeficit', 1.1, { wanted: { low: 0.8, high: 1.4 } }),
      ],
      lampDay: lampDay(),
    },
    ...changes,
  };
}

/** Air of A1 too warm since 13:54, not acknowledged. */
export function alert(changes: Partial<Alert> = {}): Alert {
  return {
    id: inventedId(900),
    shelfId: inventedId(1),
    shelfLabel: 'A1',
    sensorId: inventedId(700),
    quantity: 'airTemperature',
    kind: 'aboveRange',
    urgency: 'lookToday',
    beganAt: '2026-12-01T13:54:00Z',
    openedAt: '2026-12-01T14:04:00Z',
    peakAt: '2026-12-01T14:15:00Z',
    peakValue: 28.3,
    peakExcess: 2.3,
    peakLimit: 26,
    endedAt: null,
    clearedAt: null,
    foundLater: false,
    toldAt: '2026-12-01T14:06:00Z',
    acknowledgedAt: null,
    acknowledgedByName: null,
    acknowledgedById: null,
    acknowledgeNote: '',
    quiet: null,
    assignee: null,
    deeds: [],
    ...changes,
  };
}

/** Feeding due today, not done. */
export function task(changes: Partial<Task> = {}): Task {
  return {
    id: inventedId(800),
    routineId: inventedId(810),
    kind: 'feed',
    title: 'Feed strawberries',
    detail: 'Half strength',
    steps: [],
    amount: '',
    minutes: 10,
    plantingId: null,
    plantingLabel: null,
    rackId: null,
    rackName: null,
    shelfId: inventedId(1),
    shelfLabel: 'A1',
    dueOn: '2026-12-01',
    inTimeUntil: '2026-12-01',
    movedFrom: null,
    holders: [{ personId: inventedId(170), name: 'Jo Ashdown' }],
    personName: 'Jo Ashdown',
    cover: 'held',
    swap: null,
    outcome: null,
    doneAt: null,
    doneById: null,
    doneByName: null,
    note: '',
    millilitres: null,
    grams: null,
    count: null,
    tookMinutes: null,
    photoIds: [],
    ...changes,
  };
}

/** A room of one rack with shelf A1, its alert and a task. */
export function board(changes: Partial<Board> = {}): Board {
  const { roomId, roomName, timeZone } = membership();
  return {
    roomId,
    roomName,
    timeZone,
    at: boardAt,
    today: '2026-12-01',
    dayStart: '2026-12-01T00:00:00Z',
    dayEnd: '2026-12-02T00:00:00Z',
    sensorCount: 3,
    sensorsReporting: 3,
    racks: [{ id: inventedId(300), name: 'Rack A', note: 'window wall', shelves: [boardShelf()] }],
    openAlerts: [alert()],
    tasks: [task()],
    ...changes,
  };
}
