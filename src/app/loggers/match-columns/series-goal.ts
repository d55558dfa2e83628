import type { FileSeries } from '@shared/contracts/logger-files';

/** Where a series goes: to a sensor, to a new one on a shelf or on none, or with both null nowhere. */
export type SeriesGoal = Pick<FileSeries, 'sensorId' | 'newSensor'>;

const nowhere = 'nowhere';
const newSensor = 'new:';

/** A goal as one text, for a list to choose from. */
export function goalText({ sensorId, newSensor: made }: SeriesGoal): string {
  if (made !== null) return `${newSensor}${made.shelfId ?? ''}`;
  return sensorId ?? nowhere;
}

/** The inverse of {@link goalText}. */
export function goalOf(text: string): SeriesGoal {
  if (text === nowhere) return { sensorId: null, newSensor: null };
  if (!text.startsWith(newSensor)) return { sensorId: text, newSensor: null };
  const shelfId = text.slice(newSensor.length);
  return { sensorId: null, newSensor: { shelfId: shelfId === '' ? null : shelfId } };
}
