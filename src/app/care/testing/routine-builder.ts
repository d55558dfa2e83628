import type { Routine } from '@shared/contracts/care-routines';
import { inventedId } from '../../core/testing/board-builder';

/** Watering of shelf A1 every other day by whoever is on duty, next due tomorrow. */
export function routine(changes: Partial<Routine> = {}): Routine {
  return {
    id: inventedId(810),
    kind: 'water',
    title: 'Water from below',
    detail: '',
    place: { at: 'shelf', shelfId: inventedId(1) },
    placeLabel: 'A1',
    timing: { how: 'calendar', rule: 'FREQ=DAILY;INTERVAL=2', startsOn: '2026-11-30' },
    season: null,
    windowDays: 0,
    steps: [],
    amount: '',
    who: { how: 'onDuty' },
    skipsClosedDays: false,
    minutes: 10,
    nextDueOn: '2026-12-02',
    ...changes,
  };
}
