import { alertKinds } from './alert-rule';
import { describeEpisode, type EpisodeFacts, type EpisodeFormatters } from './describe-episode';
import type { Episode } from './episode';

const minute = 60_000;
const at = (hours: number, minutes: number) => (hours * 60 + minutes) * minute;

const celsius: EpisodeFormatters = {
  value: (value, quantity) => `${value.toFixed(1)} ${quantity.endsWith('Temperature') ? '°C' : 'units'}`,
  bareValue: (value) => String(value),
  difference: (difference, quantity) =>
    `${difference.toFixed(1)} ${quantity.endsWith('Temperature') ? '°C' : 'units'}`,
  duration: (ms) => `${Math.round(ms / minute / 60)} h`,
  time: (instant) => new Date(instant).toISOString().slice(11, 16),
};
const fahrenheit: EpisodeFormatters = {
  ...celsius,
  value: (value) => `${(value * 1.8 + 32).toFixed(1)} °F`,
  bareValue: (value) => (value * 1.8 + 32).toFixed(0),
  difference: (difference) => `${(difference * 1.8).toFixed(1)} °F`,
};

const open: Episode = {
  beganAt: at(13, 54),
  openedAt: at(14, 9),
  peakAt: at(14, 20),
  peakValue: 28.3,
  peakExcess: 2.3,
  limit: 26,
  endedAt: null,
  clearedAt: null,
  urgency: 'lookToday',
};

function facts(overrides: Partial<EpisodeFacts>): EpisodeFacts {
  return {
    episode: open,
    kind: 'aboveRange',
    quantity: 'airTemperature',
    shelfLabel: 'A1',
    formatters: celsius,
    now: at(15, 54),
    ...overrides,
  };
}

describe('an episode in words', () => {
  it('says what is wrong, since when, how far off, what was wanted and what to try', () => {
    expect(describeEpisode(facts({}))).toEqual({
      title: 'A1 air is 2.3 °C too warm',
      sentence: 'Too warm since 13:54: 28.3 °C, wanted up to 26.',
      tryThis: 'The lamp may be too close; raise it or open the vent.',
      caution: 'Usual caution: switch the lamp off before reaching in, and don’t look into the LEDs.',
    });
  });

  it.each([
    ['aboveRange', 'airTemperature', /heater/],
    ['aboveRange', 'illuminance', /window/],
    ['belowRange', 'ppfd', /timer/],
  ] as const)('that is %s of %s never blames a lamp that is off', (kind, quantity, tryThis) => {
    const unlit = describeEpisode(facts({ kind, quantity, isLit: false }));
    expect(unlit.tryThis).toMatch(tryThis);
    expect(unlit.tryThis).not.toMatch(/lamp may be/);
    const lit = describeEpisode(facts({ kind, quantity, isLit: true }));
    expect(lit).toEqual(describeEpisode(facts({ kind, quantity, isLit: null })));
    expect(lit.tryThis).toMatch(/lamp may be/);
  });

  it('of the root zone gives the same advice with lamps on or off', () => {
    const root = { quantity: 'rootZoneTemperature' as const };
    expect(describeEpisode(facts({ ...root, isLit: false }))).toEqual(describeEpisode(facts(root)));
  });

  it('is in the past tense once over', () => {
    const episode = { ...open, endedAt: at(15, 20), clearedAt: at(15, 30) };
    expect(describeEpisode(facts({ episode }))).toMatchObject({
      title: 'A1 air was 2.3 °C too warm',
      sentence: 'Too warm from 13:54 to 15:20: 28.3 °C at the highest, wanted up to 26.',
    });
  });

  it('is in the reader’s units, a difference scaled and not shifted', () => {
    expect(describeEpisode(facts({ formatters: fahrenheit }))).toMatchObject({
      title: 'A1 air is 4.1 °F too warm',
      sentence: 'Too warm since 13:54: 82.9 °F, wanted up to 79.',
    });
  });

  it.each([
    [
      'belowRange',
      'airTemperature',
      'A1 air is 2.3 °C too cold',
      'Too cold since 13:54: 28.3 °C, wanted at least 26.',
    ],
    [
      'dangerLow',
      'airTemperature',
      'A1 air is dangerously cold: 28.3 °C',
      'Dangerously cold since 13:54: 28.3 °C, danger below 26.',
    ],
    [
      'fastFall',
      'airTemperature',
      'A1 air is cooling fast',
      'Cooling fast since 13:54: 28.3 °C an hour, ordinary is up to 26.0 °C.',
    ],
    [
      'lampDark',
      'ppfd',
      'A1 is dark when its lamp should be on',
      'Dark since 13:54: 28.3 units while the lamp is planned on.',
    ],
    [
      'matStuckOn',
      'rootZoneTemperature',
      'A1 root zone is heated with nothing left to germinate',
      'Heated since 13:54: 28.3 °C warmer than the air, expected within 26.0 °C.',
    ],
    [
      'lightShort',
      'lightHours',
      'A1 day is 2.3 units too short',
      'Too short since 13:54: 28.3 units, wanted at least 26.',
    ],
    [
      'lightShort',
      'ppfd',
      'A1 day is 2.3 units too short',
      'Too short since 13:54: 28.3 units, wanted at least 26.',
    ],
    [
      'lightSumShort',
      'illuminance',
      'A1 daily light is 2.3 units too low',
      'Too low since 13:54: 28.3 units, wanted at least 26.',
    ],
    [
      'wetHours',
      'relativeHumidity',
      'A1 leaves have been wet for 28 h',
      'Wet long enough for grey mould since 13:54: 28 h, wanted up to 26 h.',
    ],
  ] as const)('%s of %s', (kind, quantity, title, sentence) => {
    expect(describeEpisode(facts({ kind, quantity }))).toMatchObject({ title, sentence });
  });

  it('counts a silence up to now, or to the reading that ended it', () => {
    const episode = { ...open, limit: 60 * minute };
    const silent = facts({ kind: 'deviceSilent', episode });
    expect(describeEpisode(silent)).toMatchObject({
      title: 'A1 device is silent',
      sentence: 'No reading since 13:54: 2 h, expected every 1 h at least.',
    });
    const over = { ...episode, endedAt: at(16, 54), clearedAt: at(16, 54) };
    expect(describeEpisode({ ...silent, episode: over }).sentence).toBe(
      'No reading from 13:54 to 16:54: 3 h, expected every 1 h at least.',
    );
  });

  it.each(alertKinds)(
    '%s names a cause only as a possibility, and cautions near lamps, mats and water',
    (kind) => {
      const { title, sentence, tryThis, caution } = describeEpisode(facts({ kind }));
      expect(title).toMatch(/^A1 /);
      expect(sentence).toMatch(/ since 13:54(: .+)?\.$/);
      expect(tryThis).toMatch(/\bmay\b/);
      if (/lamp|\bmat\b|plug/.test(tryThis) && kind !== 'sensorFailed')
        expect(caution).toMatch(/^Usual caution: /);
    },
  );
});
