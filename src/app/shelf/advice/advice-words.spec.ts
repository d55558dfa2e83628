import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { WantedRange } from '@shared/contracts/rooms';
import { changeText, lampText, matText, standingText, wantedText } from './advice-words';

const plain = (text: string): string => text.replaceAll('\u2060', '').replaceAll('\u00a0', ' ');
const wanted: ShelfAdviceView['wanted'][number] = {
  quantity: 'airTemperature',
  when: 'lampsOn',
  range: { low: 18, high: 21 },
  reason: 'Leek seedlings',
  source: 'Extension table',
  isSet: true,
};
const range: WantedRange = {
  quantity: 'airTemperature',
  lampsOn: { low: 20, high: 26 },
  lampsOff: { low: null, high: null },
  holdMinutes: 10,
  clearingMargin: 0.5,
  urgency: { by: null, afterMinutes: null },
  source: 'shelf',
  reason: '',
  since: '2026-11-01T00:00:00Z',
};

describe('what plantings want, in words', () => {
  it.each([
    [{}, '°C', 'Air with lamps on: 18–21 °C'],
    [{ when: 'lampsOff', range: { low: 10, high: null } }, '°F', 'Air with lamps off: at least 50 °F'],
    [
      { quantity: 'dailyLightIntegral', when: 'always', range: { low: 10, high: 15 } },
      '°C',
      'Light a day: 10–15 mol/m² a day',
    ],
    [
      { quantity: 'vapourPressureDeficit', when: 'always', range: { low: null, high: 0.8 } },
      '°C',
      'VPD: up to 0.80 kPa',
    ],
  ] as const)('%j is said in %s', (changes, unit, words) => {
    expect(plain(wantedText({ ...wanted, ...changes }, unit))).toBe(words);
  });

  it('says whether alerts go by it, and who set another', () => {
    expect(standingText(wanted, [range])).toBe('Alerts go by it.');
    expect(standingText({ ...wanted, isSet: false }, [range])).toMatch(/A person set another/);
    expect(standingText({ ...wanted, isSet: false }, [{ ...range, source: 'plantings' }])).toMatch(
      /no alert goes by it/,
    );
  });

  it('says what lamps and mat should do', () => {
    const lamps = { reason: '', change: null };
    expect(plain(lampText({ ...lamps, state: 'on', hours: 14 }))).toBe('Lamps on, 14 h a day');
    expect(lampText({ ...lamps, state: 'on', hours: null })).toBe('Lamps on');
    expect(lampText({ ...lamps, state: 'off', hours: null })).toBe('Lamps off');
    expect(matText({ state: 'conflict', reason: '', change: null })).toMatch(/harms another/);
    expect([changeText(null), changeText('switchOn'), changeText('lengthen')]).toEqual([
      null,
      'switch on now',
      'give longer light',
    ]);
  });
});
