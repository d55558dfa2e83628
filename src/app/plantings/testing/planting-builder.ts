import type { GerminationView } from '@shared/contracts/germination';
import type { PlantingEventView } from '@shared/contracts/planting-events';
import type { Planting, PlantingDetail } from '@shared/contracts/plantings';
import { inventedId } from '../../core/testing/board-builder';

/** Forty leek seeds on shelf A3, sown ten days before the invented board's day. */
export function listedPlanting(changes: Partial<Planting> = {}): Planting {
  return {
    id: inventedId(500),
    cropId: 'leek',
    crop: 'Leek',
    variety: 'Winter Piper',
    habit: 'blades',
    stage: 'sown',
    stageSince: '2026-11-21',
    startedOn: '2026-11-21',
    endedOn: null,
    origin: 'sown',
    sown: 40,
    up: 0,
    count: 40,
    container: 'Flat',
    shelfId: inventedId(3),
    shelfLabel: 'A3',
    harvestedGrams: 0,
    harvestedCount: 0,
    ...changes,
  };
}

/** Something that happened to it; nothing belongs to its kind unless given. */
export function plantingEvent(changes: Partial<PlantingEventView> = {}): PlantingEventView {
  return {
    id: inventedId(510),
    kind: 'noted',
    at: '2026-12-01T14:20:00Z',
    personName: 'Maren Oxley',
    note: '',
    count: null,
    grams: null,
    millilitres: null,
    stage: null,
    container: null,
    shelfId: null,
    shelfLabel: null,
    lossReason: null,
    otherPlantingId: null,
    isLast: false,
    ...changes,
  };
}

/** The same planting with its story so far: that it was sown. */
export function plantingDetail(changes: Partial<PlantingDetail> = {}): PlantingDetail {
  const startedAt = '2026-11-21T10:00:00Z';
  return {
    ...listedPlanting(changes),
    lotId: inventedId(600),
    lotName: 'packed 2024, lot 17/4',
    source: '',
    depthMm: 6,
    startedAt,
    places: [{ shelfId: inventedId(3), shelfLabel: 'A3', from: startedAt, to: null }],
    events: [
      plantingEvent({ kind: 'sown', at: startedAt, count: 40, shelfId: inventedId(3), shelfLabel: 'A3' }),
    ],
    photos: [],
    undoableEventId: null,
    ...changes,
  };
}

/** Nothing up yet, expected from 1 to 7 December. */
export function germination(changes: Partial<GerminationView> = {}): GerminationView {
  return {
    sown: 40,
    up: 0,
    curve: [],
    percent: 0,
    firstDay: null,
    lastDay: null,
    spreadDays: null,
    t50Days: null,
    meanTimeDays: null,
    standardErrorDays: null,
    isOpen: true,
    verdict: null,
    forecast: {
      earliest: { source: 'Extension table', at: '2026-12-01T08:00:00Z' },
      latest: { source: 'Thermal time', at: '2026-12-07T08:00:00Z' },
      published: [],
      basis: 'published',
      measuredBy: 'rootZoneTemperature',
      outlookC: 15.2,
      coverage: 0.98,
      isLate: false,
      causes: [],
    },
    ...changes,
  };
}
