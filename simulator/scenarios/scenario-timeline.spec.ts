import { scenarioId, type ScenarioSpan } from '@shared/contracts/simulation';
import { kestrelLane } from '@shared/demonstration/kestrel-lane';
import { calmRoom } from '../room/disturbance';
import { RoomModel, type ShelfClimate } from '../room/room-model';
import { ScenarioTimeline } from './scenario-timeline';

const MINUTE = 60_000;
const NOON = Date.parse('2025-12-01T12:00:00Z');
const START = NOON - 90 * MINUTE;

const room = kestrelLane(NOON);
const calmNoon = new RoomModel(room, 1, NOON, () => calmRoom);

function span(overrides: Partial<ScenarioSpan>): ScenarioSpan {
  const between = { from: new Date(START).toISOString(), to: new Date(NOON + 90 * MINUTE).toISOString() };
  return { scenario: 'timer-fails', shelf: 'A1', ...between, ...overrides };
}

/** The shelf at noon, an hour and a half into the scenario, beside the same noon without it. */
function atNoon(
  overrides: Partial<ScenarioSpan>,
  shelf: string,
): { disturbed: ShelfClimate; calm: ShelfClimate } {
  const timeline = new ScenarioTimeline([span(overrides)]);
  const disturbed = new RoomModel(room, 1, NOON, (at) => timeline.disturbanceAt(at));
  return { disturbed: disturbed.climateOf(shelf), calm: calmNoon.climateOf(shelf) };
}

describe('a scenario', () => {
  it('timer-fails darkens a lamp in its hours and lets the shelf cool', () => {
    const { disturbed, calm } = atNoon({ scenario: 'timer-fails', shelf: 'A1' }, 'A1');
    expect(calm.isLampLit).toBe(true);
    expect(disturbed.ppfdUmolM2S).toBe(0);
    expect(calm.airC - disturbed.airC).toBeGreaterThan(2);
  });

  it('timer-fails can keep a lamp lit on a shelf that is planned dark', () => {
    const { disturbed, calm } = atNoon({ scenario: 'timer-fails', shelf: 'A3', lamp: 'lit' }, 'A3');
    expect(calm.isLampLit).toBe(false);
    expect(disturbed.ppfdUmolM2S).toBeGreaterThan(100);
  });

  it('mat-stuck-on overheats the root zone of its shelf alone', () => {
    const { disturbed, calm } = atNoon({ scenario: 'mat-stuck-on', shelf: 'A4' }, 'A4');
    expect(disturbed.rootZoneC - calm.rootZoneC).toBeGreaterThan(2);
    const neighbour = atNoon({ scenario: 'mat-stuck-on', shelf: 'A4' }, 'A3');
    expect(Math.abs(neighbour.disturbed.rootZoneC - neighbour.calm.rootZoneC)).toBeLessThan(0.1);
  });

  it('door-open cools the whole room, and its shelf most', () => {
    const atDoor = atNoon({ scenario: 'door-open', shelf: 'B1' }, 'B1');
    const farOff = atNoon({ scenario: 'door-open', shelf: 'B1' }, 'A2');
    const coolingAtDoor = atDoor.calm.airC - atDoor.disturbed.airC;
    expect(coolingAtDoor).toBeGreaterThan(farOff.calm.airC - farOff.disturbed.airC);
    expect(farOff.calm.airC - farOff.disturbed.airC).toBeGreaterThan(0.5);
  });

  it('dry-spell dries the air of its shelf and hardly another’s', () => {
    const atRadiator = atNoon({ scenario: 'dry-spell', shelf: 'B2' }, 'B2');
    expect(atRadiator.calm.relativeHumidityPct - atRadiator.disturbed.relativeHumidityPct).toBeGreaterThan(
      12,
    );
    const farOff = atNoon({ scenario: 'dry-spell', shelf: 'B2' }, 'A1');
    expect(Math.abs(farOff.calm.relativeHumidityPct - farOff.disturbed.relativeHumidityPct)).toBeLessThan(3);
  });

  it.each(['sensor-silent', 'sensor-drift'] as const)('%s leaves the room itself as it is', (scenario) => {
    const { disturbed, calm } = atNoon({ scenario, shelf: 'A1' }, 'A1');
    expect(disturbed).toEqual(calm);
  });
});

describe('the timeline of scenarios', () => {
  const airOfA1 = {
    key: 'a1-air',
    quantity: 'airTemperature',
    shelf: 'A1',
    expectedIntervalSeconds: 60,
  } as const;
  const humidityOfA1 = { ...airOfA1, key: 'a1-humidity', quantity: 'relativeHumidity' } as const;

  it.each(scenarioId.options)('before %s begins and once it has ended disturbs nothing', (scenario) => {
    const timeline = new ScenarioTimeline([span({ scenario })]);
    for (const at of [START - 1, NOON + 90 * MINUTE]) {
      expect(timeline.disturbanceAt(at)).toBe(calmRoom);
      expect(timeline.sensorEffectAt(airOfA1, at)).toEqual({});
    }
  });

  it('silences only the quantity that is named', () => {
    const timeline = new ScenarioTimeline([
      span({ scenario: 'sensor-silent', quantity: 'relativeHumidity' }),
    ]);
    expect(timeline.sensorEffectAt(humidityOfA1, NOON)).toEqual({ isSilent: true });
    expect(timeline.sensorEffectAt(airOfA1, NOON)).toEqual({});
  });

  it('lets a sensor drift from nothing to all of it over the span', () => {
    const timeline = new ScenarioTimeline([span({ scenario: 'sensor-drift' })]);
    expect(timeline.sensorEffectAt(airOfA1, START).drift).toBe(0);
    expect(timeline.sensorEffectAt(airOfA1, NOON).drift).toBeCloseTo(0.5, 9);
  });

  it('plays two scenarios of one shelf together', () => {
    const timeline = new ScenarioTimeline([
      span({ scenario: 'timer-fails' }),
      span({ scenario: 'mat-stuck-on' }),
    ]);
    expect(timeline.disturbanceAt(NOON).shelves.get('A1')).toMatchObject({
      lamp: 'dark',
      isHeatMatStuckOn: true,
    });
  });

  it('ends a run once, at the instant asked for', () => {
    const timeline = new ScenarioTimeline();
    const { run } = timeline.add(span({}));
    expect(timeline.end(run, NOON)).toBe(true);
    expect(timeline.runningAt(NOON)).toEqual([]);
    expect(timeline.runningAt(NOON - 1)).toHaveLength(1);
    expect(timeline.end(run, NOON)).toBe(false);
  });
});
