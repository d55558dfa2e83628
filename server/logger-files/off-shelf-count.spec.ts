import { OffShelfCount, type PlacedSensor } from './off-shelf-count';

const HOUR = 3_600_000;
const start = Date.UTC(2026, 3, 1);
const at = (hour: number): number => start + hour * HOUR;
const iso = (hour: number): string => new Date(at(hour)).toISOString();

function counted(sensor: PlacedSensor | null, hours: readonly number[]) {
  const count = new OffShelfCount([sensor]);
  for (const hour of hours) count.take(0, at(hour));
  return count.found();
}

describe('readings of a sensor that was on no shelf', () => {
  const moved: PlacedSensor = {
    sensorId: 's',
    stays: [
      { shelfLabel: 'A1', from: at(2), to: at(4) },
      { shelfLabel: 'B2', from: at(6), to: Infinity },
    ],
  };
  const firstShelf = { label: 'A1', since: iso(2) };

  it('are told apart: before its first shelf, and between two', () => {
    expect(counted(moved, [0, 1, 2, 3, 4, 5, 6, 7])).toEqual([
      { sensorId: 's', when: 'beforeFirstShelf', count: 2, from: iso(0), to: iso(1), firstShelf },
      { sensorId: 's', when: 'betweenShelves', count: 2, from: iso(4), to: iso(5), firstShelf },
    ]);
  });

  it('are the same in any order', () => {
    expect(counted(moved, [5, 0, 7, 4, 1, 3])).toEqual([
      { sensorId: 's', when: 'betweenShelves', count: 2, from: iso(4), to: iso(5), firstShelf },
      { sensorId: 's', when: 'beforeFirstShelf', count: 2, from: iso(0), to: iso(1), firstShelf },
    ]);
  });

  it('are all of them where it never was on one', () => {
    expect(counted({ sensorId: 's', stays: [] }, [0, 1, 2])).toEqual([
      { sensorId: 's', when: 'neverOnShelf', count: 3, from: iso(0), to: iso(2), firstShelf: null },
    ]);
  });

  it('are none where it always was on one, or is still to be made', () => {
    const stays = [{ shelfLabel: 'A1', from: at(0), to: Infinity }];
    expect(counted({ sensorId: 's', stays }, [0, 1, 2])).toEqual([]);
    expect(counted(null, [0, 1])).toEqual([]);
  });
});
