import { inventedId } from '../../core/testing/board-builder';
import { fileSeries } from '../testing/logger-file-builder';
import { goalOf, goalText, proposedGoals } from './series-goal';

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

describe('the proposals for a file', () => {
  const [first, second] = [inventedId(702), inventedId(703)];
  const open = (key: string, ...sensorIds: string[]) =>
    fileSeries({
      key,
      sensorId: null,
      proposals: sensorIds.map((sensorId) => ({ sensorId, reason: 'It measures that.' })),
    });

  it('give each series its best sensor that no other has', () => {
    expect(proposedGoals([open('1', first, second), open('2', first, second), open('3', first)])).toEqual([
      { key: '1', sensorId: first },
      { key: '2', sensorId: second },
    ]);
  });

  it('leave alone what a person has chosen, and what is only compared', () => {
    const chosen = fileSeries({ key: '1', sensorId: first });
    const made = { ...open('2', second), newSensor: { shelfId: null } };
    const compared = { ...open('3', second), isCompared: true };
    expect(proposedGoals([chosen, made, compared, open('4', first)])).toEqual([]);
  });
});
