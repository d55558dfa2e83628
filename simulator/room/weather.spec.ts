import { relativeHumidityPct } from './moist-air';
import { outdoorAirAt } from './weather';

const HOUR = 3_600_000;
const DAY = 24 * HOUR;
const place = { seed: 3, latitudeDeg: 53.3, longitudeDeg: -6.4 };

function meanTemperatureC(latitudeDeg: number, month: string): number {
  const start = Date.parse(`2025-${month}-01T00:00:00Z`);
  let sum = 0;
  for (let hour = 0; hour < 28 * 24; hour += 1) {
    sum += outdoorAirAt({ ...place, latitudeDeg }, start + hour * HOUR).temperatureC;
  }
  return sum / (28 * 24);
}

describe('the weather outside', () => {
  it('is the same at an instant whenever it is asked for', () => {
    const at = Date.parse('2025-11-03T07:30:00Z');
    expect(outdoorAirAt(place, at)).toEqual(outdoorAirAt(place, at));
  });

  it('is warm in July and cold in January in the north, the other way round in the south', () => {
    expect(meanTemperatureC(53.3, '07') - meanTemperatureC(53.3, '01')).toBeGreaterThan(6);
    expect(meanTemperatureC(-40, '07') - meanTemperatureC(-40, '01')).toBeLessThan(-4);
  });

  it('never holds more water than it can and never jumps from minute to minute', () => {
    const start = Date.parse('2025-01-01T00:00:00Z');
    for (let at = start; at < start + 365 * DAY; at += HOUR) {
      const now = outdoorAirAt(place, at);
      const next = outdoorAirAt(place, at + 60_000);
      expect(relativeHumidityPct(now.temperatureC, now.humidityRatioKgKg)).toBeLessThan(100);
      expect(Math.abs(next.temperatureC - now.temperatureC)).toBeLessThan(0.1);
    }
  });
});
