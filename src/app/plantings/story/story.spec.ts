import { inventedId } from '../../core/testing/board-builder';
import { plantingDetail, plantingEvent } from '../testing/planting-builder';
import { storyOf } from './story';

describe('the story of a planting', () => {
  const sown = plantingEvent({ id: inventedId(1), kind: 'sown', count: 40, at: '2026-11-21T10:00:00Z' });
  const counted = plantingEvent({ id: inventedId(2), kind: 'counted', count: 3, at: '2026-12-01T09:00:00Z' });
  const noted = plantingEvent({ id: inventedId(3), note: 'Hooks', at: '2026-12-01T09:00:00Z' });
  const photo = {
    id: inventedId(4),
    at: '2026-11-28T09:00:00Z',
    caption: 'Still bare',
    width: 1600,
    height: 1200,
    personId: null,
    personName: null,
  };

  it('is told from the newest, photos among what happened', () => {
    const story = storyOf(plantingDetail({ events: [sown, counted, noted], photos: [photo] }));
    expect(story.map(({ text, note }) => [text, note])).toEqual([
      ['Note', 'Hooks'],
      ['3 up', ''],
      ['Photo', 'Still bare'],
      ['40 seeds sown', ''],
    ]);
    expect(story[2]?.photoId).toBe(photo.id);
  });

  it('lets only the event be taken back that the server says', () => {
    const story = storyOf(plantingDetail({ events: [sown, counted], undoableEventId: counted.id }));
    expect(story.filter(({ canUndo }) => canUndo).map(({ id }) => id)).toEqual([counted.id]);
  });
});
