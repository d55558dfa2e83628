import type { ShelfAdviceView } from '@shared/contracts/advice';
import { inventedId } from './board-builder';

/** Advice on shelf A1 that asks for nothing. */
export function shelfAdvice(changes: Partial<ShelfAdviceView> = {}): ShelfAdviceView {
  return {
    shelfId: inventedId(1),
    since: '2026-12-01T09:00:00Z',
    lamps: { state: 'on', hours: 14, reason: 'Dwarf tomato is up and wants 14–16 h of light.', change: null },
    heatMat: { state: 'off', reason: 'Nothing here waits to germinate.', change: null },
    wanted: [],
    conflicts: [],
    moves: [],
    dayLength: [],
    notes: [],
    ...changes,
  };
}

/** Two plantings whose air does not go together: 2.8 °C apart. */
export function airConflict(
  changes: Partial<ShelfAdviceView['conflicts'][number]> = {},
): ShelfAdviceView['conflicts'][number] {
  return {
    kind: 'range',
    quantity: 'airTemperature',
    when: 'lampsOn',
    plantingIds: [inventedId(500), inventedId(501)],
    gap: 2.8,
    sentence: 'Aubergine wants at least 21.1 °C, Lettuce at most 18.3 °C: 2.8 °C apart.',
    ...changes,
  };
}
