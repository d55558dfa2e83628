import type { SentReading } from '@shared/contracts/devices';
import { ReadingQueue } from './reading-queue';

function reading(value: number): SentReading {
  return { sensor: 'a1-air', at: new Date(value * 1000).toISOString(), value };
}

describe('the queue of a device', () => {
  it('gives the oldest first and keeps them until they are acknowledged', () => {
    const queue = new ReadingQueue(10);
    queue.push([reading(1), reading(2), reading(3)]);
    const batch = queue.oldest(2);
    expect(batch.map(({ value }) => value)).toEqual([1, 2]);
    expect(queue.length).toBe(3);
    queue.remove(batch);
    expect(queue.oldest(9).map(({ value }) => value)).toEqual([3]);
  });

  it('when full lets the oldest give way and counts them', () => {
    const queue = new ReadingQueue(3);
    queue.push([1, 2, 3, 4, 5].map(reading));
    expect(queue.oldest(9).map(({ value }) => value)).toEqual([3, 4, 5]);
    expect(queue.droppedCount).toBe(2);
  });

  it('does not lose a newer reading when some of an acknowledged batch have given way meanwhile', () => {
    const queue = new ReadingQueue(3);
    queue.push([1, 2, 3].map(reading));
    const batch = queue.oldest(2);
    queue.push([reading(4)]);
    queue.remove(batch);
    expect(queue.oldest(9).map(({ value }) => value)).toEqual([3, 4]);
  });
});
