import { resolveSenml } from './senml';
import { senmlPack } from './devices';

const now = Date.UTC(2026, 11, 1, 6);

describe('a SenML pack', () => {
  // RFC 8428 §5.1.1, the single data point; its time is left out there and means now (§4.5.3).
  it('of one record without a time is read at the present', () => {
    const pack = senmlPack.parse([{ n: 'urn:dev:ow:10e2073a01080063', u: 'Cel', v: 23.1 }]);
    expect(resolveSenml(pack, now).readings).toEqual([
      { sensor: 'urn:dev:ow:10e2073a01080063', at: '2026-12-01T06:00:00.000Z', value: 23.1 },
    ]);
  });

  // RFC 8428 §5.1.3, first part: base name, base time, and times relative to it.
  it('adds base name and base time to the records after them', () => {
    const pack = senmlPack.parse([
      {
        bn: 'urn:dev:ow:10e2073a0108006:',
        bt: 1.276020076001e9,
        bu: 'A',
        bver: 5,
        n: 'voltage',
        u: 'V',
        v: 120.1,
      },
      { n: 'current', t: -5, v: 1.2 },
      { n: 'current', t: -4, v: 1.3 },
    ]);
    expect(resolveSenml(pack, now).readings).toEqual([
      { sensor: 'urn:dev:ow:10e2073a0108006:voltage', at: '2010-06-08T18:01:16.001Z', value: 120.1 },
      { sensor: 'urn:dev:ow:10e2073a0108006:current', at: '2010-06-08T18:01:11.001Z', value: 1.2 },
      { sensor: 'urn:dev:ow:10e2073a0108006:current', at: '2010-06-08T18:01:12.001Z', value: 1.3 },
    ]);
  });

  // RFC 8428 §4.5.3: below 2^28 seconds a time is relative to now.
  it('takes small times as relative to the present', () => {
    const { readings } = resolveSenml([{ n: 'air', t: -60, v: 20 }], now);
    expect(readings[0]?.at).toBe('2026-12-01T05:59:00.000Z');
  });

  it('adds a base value, zero being a value', () => {
    const { readings } = resolveSenml([{ bn: 'a', bv: 20, v: 0 }, { v: 1.5 }], now);
    expect(readings.map(({ value }) => value)).toEqual([20, 21.5]);
  });

  it('names the record that has no number or asks to be understood', () => {
    const pack = senmlPack.parse([
      { n: 'air', v: 20 },
      { n: 'label', vs: 'text' },
      { n: 'air', v: 21, odd_: 1 },
    ]);
    const { readings, problems } = resolveSenml(pack, now);
    expect(readings).toHaveLength(1);
    expect(problems.map(({ index }) => index)).toEqual([1, 2]);
  });

  it('with a time that is no instant is a problem, not a reading', () => {
    expect(resolveSenml([{ n: 'air', t: 1e300, v: 20 }], now).problems).toHaveLength(1);
  });
});
