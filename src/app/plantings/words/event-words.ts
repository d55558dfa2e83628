import type { PlantingEventView } from '@shared/contracts/planting-events';
import type { LossReason, PlantingEventKind } from '@shared/growing/planting-event';
import { pieceWords, plantWords, stageNames, volumeWords, weightWords } from './planting-facts';

/** Why plants were lost, as a choice and in a sentence. */
export const lossWords: Readonly<Record<LossReason, string>> = {
  dampingOff: 'Damping off',
  driedOut: 'Dried out',
  overwatered: 'Too wet',
  pests: 'Pests',
  disease: 'Disease',
  heat: 'Too warm',
  cold: 'Too cold',
  thinned: 'Thinned out',
  givenAway: 'Given away',
  accident: 'Accident',
  unknown: 'Nobody knows',
};

/** The icon of each kind of event. */
export const eventIcons: Readonly<Record<PlantingEventKind, string>> = {
  sown: 'grain',
  broughtIn: 'input',
  counted: 'tag',
  staged: 'flag',
  moved: 'swap_horiz',
  prickedOut: 'grass',
  pottedOn: 'potted_plant',
  split: 'call_split',
  merged: 'call_merge',
  plantedOut: 'nature',
  lost: 'heart_broken',
  harvested: 'shopping_basket',
  watered: 'water_drop',
  noted: 'edit_note',
  ended: 'check_circle',
};

/** An event in a few words, without its note: "12 up", "Moved to A2", "2 plants lost: dried out". */
export function eventWords(event: PlantingEventView): string {
  const plants = event.count === null ? null : plantWords(event.count);
  switch (event.kind) {
    case 'sown':
      return `${event.count === 1 ? '1 seed' : `${event.count ?? 0} seeds`} sown${onto(event)}`;
    case 'broughtIn':
      return `${plants ?? 'Plants'} brought in${onto(event)}`;
    case 'counted':
      return `${event.count ?? 0} up${event.isLast ? ', no more to come' : ''}`;
    case 'staged':
      return event.stage === null ? 'Stage set' : stageNames[event.stage];
    case 'moved':
      return event.shelfLabel === null ? 'Moved to no shelf' : `Moved to ${event.shelfLabel}`;
    case 'prickedOut':
      return `${plants ?? 'Plants'} pricked out${into(event)}`;
    case 'pottedOn':
      return `Potted on${into(event)}`;
    case 'split':
      return `${plants ?? 'Plants'} parted off`;
    case 'merged':
      return `${plants ?? 'Plants'} taken in`;
    case 'plantedOut':
      return `${plants ?? 'All'} planted out`;
    case 'lost':
      return `${plants ?? 'Plants'} lost${event.lossReason === null ? '' : `: ${lossWords[event.lossReason].toLowerCase()}`}`;
    case 'harvested':
      return `Harvested ${harvestOf(event)}`;
    case 'watered':
      return event.millilitres === null ? 'Watered' : `Watered, ${volumeWords(event.millilitres)}`;
    case 'noted':
      return 'Note';
    case 'ended':
      return event.otherPlantingId === null ? 'Ended' : 'Taken into another planting';
  }
}

function onto({ shelfLabel }: PlantingEventView): string {
  return shelfLabel === null ? '' : ` on ${shelfLabel}`;
}

function into({ container }: PlantingEventView): string {
  return container === null || container === '' ? '' : ` into ${container}`;
}

function harvestOf({ grams, count }: PlantingEventView): string {
  const parts = [
    ...(grams === null ? [] : [weightWords(grams)]),
    ...(count === null ? [] : [pieceWords(count)]),
  ];
  return parts.join(', ');
}
