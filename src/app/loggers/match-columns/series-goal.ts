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

/**
 * The best proposal for every series that goes nowhere yet; no sensor is proposed twice.
 *
 * @returns Only the series that have one.
 */
export function proposedGoals(series: readonly FileSeries[]): readonly { key: string; sensorId: string }[] {
  const taken = new Set(series.map(({ sensorId }) => sensorId));
  return series.flatMap(({ key, sensorId, newSensor: made, isCompared, proposals }) => {
    if (sensorId !== null || made !== null || isCompared) return [];
    const best = proposals.find((proposal) => !taken.has(proposal.sensorId));
    if (best === undefined) return [];
    taken.add(best.sensorId);
    return [{ key, sensorId: best.sensorId }];
  });
}
