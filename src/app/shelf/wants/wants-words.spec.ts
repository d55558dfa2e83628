import type { WantedRange } from '@shared/contracts/rooms';
import { planting } from '../../core/testing/board-builder';
import { lampWords, lightWords, matWords, rangeWords } from './wants-words';

const lamp = { id: '', kind: 'whiteLed', watts: 46, luxPerUmol: 70, fittedOn: '2026-03-02' } as const;
const hours = (switchesOn: string | null, switchesOff: string | null) => ({ switchesOn, switchesOff });

describe('planned lamp hours', () => {
  it.each([
    [[lamp], hours('06:00', '22:00'), 'Lamps 06:00–22:00', '16 h a day'],
    [[lamp], hours('20:00', '06:30'), 'Lamps 20:00–06:30', '10.5 h a day'],
    [[lamp], hours(null, null), 'Lamps off all day', 'This shelf is kept dark.'],
    [[lamp], hours('06:00', '06:00'), 'Lamps on all day', '24 h a day'],
    [[], hours('06:00', '22:00'), 'No lamp fitted', ''],
  ])('of %j over %j are told', (lamps, lampHours, text, reason) => {
    expect(lampWords({ lamps: lamps as never, lampHours })).toEqual({ text, reason });
  });
});

describe('the light of a day', () => {
  const light = { leastMolM2D: 10, source: 'plantings', reason: 'Leek seedlings', since: '' } as const;
  it.each([
    [light, 'Light a day at least 10.0 mol/m²', 'From what grows here · Leek seedlings'],
    [
      { ...light, source: 'shelf', reason: '' } as const,
      'Light a day at least 10.0 mol/m²',
      'Set for this shelf',
    ],
    [{ ...light, leastMolM2D: 0 }, 'Any light a day will do', 'From what grows here · Leek seedlings'],
    [null, 'Light a day is free', ''],
  ])('of %j is told', (wanted, text, reason) => {
    expect(lightWords(wanted)).toEqual({ text: text.replace(' mol', '\u00a0mol'), reason });
  });
});

function range(changes: Partial<WantedRange> = {}): WantedRange {
  return {
    quantity: 'airTemperature',
    lampsOn: { low: 20, high: 26 },
    lampsOff: { low: 16, high: 20 },
    holdMinutes: 10,
    clearingMargin: 0.5,
    urgency: { by: 4, afterMinutes: 360 },
    source: 'shelf',
    since: '2026-11-01T00:00:00Z',
    reason: 'Where both plantings’ ranges meet',
    ...changes,
  };
}
const none = { low: null, high: null };

describe('a wanted range', () => {
  it.each([
    [range(), 'Air 20–26\u00a0°C with lamps on, 16–20\u00a0°C with lamps off'],
    [range({ lampsOff: none }), 'Air 20–26\u00a0°C with lamps on'],
    [range({ lampsOn: none }), 'Air 16–20\u00a0°C with lamps off'],
    [range({ lampsOff: { low: 20, high: 26 } }), 'Air 20–26\u00a0°C'],
  ])('is told for both sides of the lamps, once when they agree', (of, text) => {
    const { text: told, reason } = rangeWords(of, '°C');
    expect(told.replaceAll('\u2060', '')).toBe(text);
    expect(reason).toBe('Set for this shelf · Where both plantings’ ranges meet');
  });

  it.each([
    ['shelf', '', 'Set for this shelf'],
    ['plantings', 'Leeks germinate at this', 'From what grows here · Leeks germinate at this'],
    ['room', '', 'As everywhere in this room'],
  ] as const)('from the %s with the reason %j says where it comes from', (source, reason, words) => {
    expect(rangeWords(range({ source, reason }), '°C').reason).toBe(words);
  });

  it('is told in the reader’s unit', () => {
    expect(rangeWords(range({ lampsOff: none }), '°F').text.replaceAll('\u2060', '')).toBe(
      'Air 68.0–78.8\u00a0°F with lamps on',
    );
  });
});

describe('the heat mat', () => {
  it('says whether anything waits to germinate', () => {
    const heatMat = { watts: 40, isOn: false };
    expect(matWords({ heatMat }, [planting()])?.reason).toBe('Nothing here is waiting to germinate.');
    expect(matWords({ heatMat }, [planting({ stage: 'sown' })])?.reason).toBe('Seed here waits to come up.');
    expect(matWords({ heatMat: null }, [])).toBeNull();
  });
});
