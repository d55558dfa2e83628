import type { LoggerSeries } from './logger-file-shape';
import type { MatchableSensor } from './propose-matches';
import { proposeMatches } from './propose-matches';

function series(over: Partial<LoggerSeries>): LoggerSeries {
  return {
    key: '1',
    index: 0,
    sensorName: '',
    column: 1,
    name: 'Temp',
    quantity: 'airTemperature',
    unit: '°C',
    ...over,
  };
}

function sensor(id: string, over: Partial<MatchableSensor> = {}): MatchableSensor {
  return {
    id,
    quantity: 'airTemperature',
    shelfLabel: 'A1',
    label: `Probe ${id}`,
    deviceName: 'Grey box',
    ...over,
  };
}

function ranking(one: LoggerSeries, sensors: readonly MatchableSensor[], fileName?: string): string[] {
  return proposeMatches([one], sensors, fileName)[0]?.proposals.map(({ sensorId }) => sensorId) ?? [];
}

describe('proposeMatches', () => {
  it('with a header that names a shelf, puts the sensor of that shelf first and says why', () => {
    const sensors = [sensor('x'), sensor('y', { shelfLabel: 'A12' })];
    const [found] = proposeMatches([series({ name: 'Shelf A12 / Temp (°C)' })], sensors);
    expect(found?.proposals[0]?.sensorId).toBe('y');
    expect(found?.proposals[0]?.reason).toContain('A12');
  });

  it('with a shelf label that is only part of a word, does not take it for the shelf', () => {
    const sensors = [sensor('x', { shelfLabel: 'A1' }), sensor('y', { shelfLabel: 'B2' })];
    const [found] = proposeMatches([series({ name: 'A12 temp' })], sensors);
    const [first, second] = found?.proposals ?? [];
    expect(first?.score).toBe(second?.score);
  });

  it('with a sensor named in the rows, prefers it to one named by the file', () => {
    const sensors = [sensor('x', { shelfLabel: 'B2' }), sensor('y', { label: 'North probe' })];
    expect(ranking(series({ sensorName: 'North probe' }), sensors, 'shelf-B2.csv')).toEqual(['y', 'x']);
  });

  it('with sensors of other quantities, proposes none of them', () => {
    expect(ranking(series({}), [sensor('x', { quantity: 'relativeHumidity' })])).toEqual([]);
  });

  it('with a computed quantity, is compared and needs no sensor', () => {
    const [found] = proposeMatches(
      [series({ quantity: 'dewPoint' })],
      [sensor('x', { quantity: 'dewPoint' })],
    );
    expect(found).toEqual({ seriesKey: '1', isCompared: true, proposals: [] });
  });
});
