import fc from 'fast-check';

import { plannedLight, type LampHoursPlan } from './lamp-hours';

const dublin = 'Europe/Dublin';
const at = (iso: string): number => Date.parse(iso);
const plan = (switchesOn: string | null, switchesOff: string | null, validFrom = '2026-01-01T00:00Z') => ({
  validFrom: at(validFrom),
  switchesOn,
  switchesOff,
});
const lit = (plans: LampHoursPlan[], from: string, to: string, zone = dublin): string[] =>
  plannedLight(plans, zone, { from: at(from), to: at(to) }).map(
    ({ onAt, offAt }) => `${iso(onAt)}/${iso(offAt)}`,
  );
const iso = (ms: number): string => new Date(ms).toISOString().slice(0, 16);

describe('plannedLight', () => {
  it.each([
    ['in winter on GMT', '06:00', '22:00', '2026-01-10T00:00Z', ['2026-01-10T06:00/2026-01-10T22:00']],
    ['in summer an hour ahead', '06:00', '22:00', '2026-07-09T23:00Z', ['2026-07-10T05:00/2026-07-10T21:00']],
    [
      'past midnight, at both ends of the day',
      '20:00',
      '08:00',
      '2026-01-10T00:00Z',
      ['2026-01-10T00:00/2026-01-10T08:00', '2026-01-10T20:00/2026-01-11T00:00'],
    ],
    [
      'all day with equal times',
      '06:00',
      '06:00',
      '2026-01-10T00:00Z',
      ['2026-01-10T00:00/2026-01-11T00:00'],
    ],
    ['until midnight', '08:00', '00:00', '2026-01-10T00:00Z', ['2026-01-10T08:00/2026-01-11T00:00']],
    ['never on a dark shelf', null, null, '2026-01-10T00:00Z', []],
  ])('lights a day %s', (_, on, off, from, expected) => {
    const to = new Date(at(from) + 86_400_000).toISOString();

    expect(lit([plan(on, off)], from, to)).toEqual(expected);
  });

  // Dublin's clocks go from 01:00 GMT to 02:00 on 29 March 2026, and from 02:00 back to 01:00 GMT on 25 October 2026
  // (IANA time zone database).
  it.each([
    [
      'keeps clock times over the change in spring',
      '06:00',
      '22:00',
      '2026-03-28T00:00Z',
      '2026-03-30T00:00Z',
      ['2026-03-28T06:00/2026-03-28T22:00', '2026-03-29T05:00/2026-03-29T21:00'],
    ],
    [
      'keeps clock times over the change in autumn',
      '06:00',
      '22:00',
      '2026-10-24T00:00Z',
      '2026-10-26T00:00Z',
      ['2026-10-24T05:00/2026-10-24T21:00', '2026-10-25T06:00/2026-10-25T22:00'],
    ],
    [
      'is an hour short in the night of spring',
      '22:00',
      '06:00',
      '2026-03-28T12:00Z',
      '2026-03-29T12:00Z',
      ['2026-03-28T22:00/2026-03-29T05:00'],
    ],
    [
      'is an hour long in the night of autumn',
      '22:00',
      '06:00',
      '2026-10-24T12:00Z',
      '2026-10-25T12:00Z',
      ['2026-10-24T21:00/2026-10-25T06:00'],
    ],
    [
      'puts a skipped switching time an hour later',
      '01:30',
      '04:00',
      '2026-03-29T00:00Z',
      '2026-03-29T12:00Z',
      ['2026-03-29T01:30/2026-03-29T03:00'],
    ],
    [
      'takes the first of a switching time that comes twice',
      '00:30',
      '01:30',
      '2026-10-24T22:00Z',
      '2026-10-25T12:00Z',
      ['2026-10-24T23:30/2026-10-25T00:30'],
    ],
  ])('%s', (_, on, off, from, to, expected) => {
    expect(lit([plan(on, off)], from, to)).toEqual(expected);
  });

  // Apia went from −11 h to −10 h at midnight of 26 September 2010 (IANA time zone database).
  it('takes the offset of the day itself far west of Greenwich', () => {
    const plans = [plan('06:00', '22:00', '2010-01-01T00:00Z')];

    expect(lit(plans, '2010-09-26T12:00Z', '2010-09-27T12:00Z', 'Pacific/Apia')).toEqual([
      '2010-09-26T16:00/2010-09-27T08:00',
    ]);
  });

  it('follows a plan from the instant on at which it was made, in the middle of a day', () => {
    const plans = [plan('06:00', '22:00'), plan('14:00', '20:00', '2026-01-10T12:00Z')];

    expect(lit(plans, '2026-01-10T00:00Z', '2026-01-12T00:00Z')).toEqual([
      '2026-01-10T06:00/2026-01-10T12:00',
      '2026-01-10T14:00/2026-01-10T20:00',
      '2026-01-11T14:00/2026-01-11T20:00',
    ]);
  });

  it('joins the light of two plans where the lamp stays on', () => {
    const plans = [plan('06:00', '22:00'), plan('08:00', '20:00', '2026-01-10T12:00Z')];

    expect(lit(plans, '2026-01-10T00:00Z', '2026-01-11T00:00Z')).toEqual([
      '2026-01-10T06:00/2026-01-10T20:00',
    ]);
  });

  it('plans nothing before the first plan', () => {
    const plans = [plan('06:00', '22:00', '2026-01-10T12:00Z')];

    expect(lit(plans, '2026-01-09T00:00Z', '2026-01-11T00:00Z')).toEqual([
      '2026-01-10T12:00/2026-01-10T22:00',
    ]);
  });

  it('agrees with the clock on the wall at every minute, on days without a change', () => {
    const minuteOfDay = fc.integer({ min: 0, max: 1439 });
    const clock = (minute: number): string =>
      `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
    const from = at('2026-06-10T00:00Z');
    fc.assert(
      fc.property(minuteOfDay, minuteOfDay, fc.integer({ min: 0, max: 2 * 1440 }), (on, off, minute) => {
        const stretches = plannedLight([plan(clock(on), clock(off))], dublin, {
          from,
          to: from + 3 * 86_400_000,
        });

        const moment = from + minute * 60_000;
        const isLit = stretches.some(({ onAt, offAt }) => onAt <= moment && moment < offAt);
        const wall = (minute + 60) % 1440;
        const sinceOn = (wall - on + 1440) % 1440;
        const length = (off - on + 1440) % 1440;
        expect(isLit).toBe(length === 0 || sinceOn < length);
      }),
    );
  });

  it('gives the same light for a span as for its two halves', () => {
    const from = at('2026-03-27T00:00Z');
    const to = at('2026-04-01T00:00Z');
    const plans = [plan('20:00', '08:00'), plan('06:00', '22:00', '2026-03-29T01:20Z')];
    fc.assert(
      fc.property(fc.integer({ min: from + 1, max: to - 1 }), (middle) => {
        const length = (span: { from: number; to: number }): number =>
          plannedLight(plans, dublin, span).reduce((sum, { onAt, offAt }) => sum + offAt - onAt, 0);

        expect(length({ from, to: middle }) + length({ from: middle, to })).toBe(length({ from, to }));
      }),
    );
  });
});
