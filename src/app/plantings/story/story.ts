import type { PlantingEventView } from '@shared/contracts/planting-events';
import type { PlantingDetail } from '@shared/contracts/plantings';
import { eventIcons, eventWords } from '../words/event-words';

/** A line of a planting's story. */
export interface StoryLine {
  readonly id: string;
  readonly at: string;
  readonly icon: string;
  readonly text: string;
  readonly note: string;
  readonly personName: string | null;
  /** The other planting that it is about; null for none. */
  readonly otherId: string | null;
  /** The photo that it is; null for an event. */
  readonly photoId: string | null;
  readonly canUndo: boolean;
}

/** Everything that happened to a planting and every photo of it, newest first. */
export function storyOf({
  events,
  photos,
  undoableEventId,
}: Pick<PlantingDetail, 'events' | 'photos' | 'undoableEventId'>): readonly StoryLine[] {
  const happened = events.map((event): StoryLine => ({
    ...origin(event),
    icon: eventIcons[event.kind],
    text: eventWords(event),
    note: event.note,
    otherId: event.otherPlantingId,
    photoId: null,
    canUndo: event.id === undoableEventId,
  }));
  const seen = photos.map((photo): StoryLine => ({
    ...origin(photo),
    icon: 'photo_camera',
    text: 'Photo',
    note: photo.caption,
    otherId: null,
    photoId: photo.id,
    canUndo: false,
  }));
  // What happened in one minute keeps the order in which it was written down.
  return [...happened, ...seen].sort((one, other) => Date.parse(one.at) - Date.parse(other.at)).reverse();
}

function origin({
  id,
  at,
  personName,
}: Pick<PlantingEventView, 'id' | 'at' | 'personName'>): Pick<StoryLine, 'id' | 'at' | 'personName'> {
  return { id, at, personName };
}
