import { inventedId } from '../../core/testing/board-builder';
import { goalOf, goalText } from './series-goal';

describe('where a series goes', () => {
  it.each([
    { sensorId: null, newSensor: null },
    { sensorId: inventedId(702), newSensor: null },
    { sensorId: null, newSensor: { shelfId: inventedId(3) } },
    { sensorId: null, newSensor: { shelfId: null } },
  ])('reads back as it was written: %j', (goal) => {
    expect(goalOf(goalText(goal))).toEqual(goal);
  });

  it('differs for every goal', () => {
    const texts = [
      goalText({ sensorId: null, newSensor: null }),
      goalText({ sensorId: null, newSensor: { shelfId: null } }),
    ];
    expect(new Set(texts).size).toBe(2);
  });
});
