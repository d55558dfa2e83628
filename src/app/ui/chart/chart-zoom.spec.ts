import { movedSpan, spanShownBy, zoomedSpan } from './chart-zoom';

const minute = 60_000;
const whole = { from: 0, to: 1000 * minute };

describe('a zoom', () => {
  it('keeps its middle', () => {
    expect(zoomedSpan(whole, whole, 0.5)).toEqual({ from: 250 * minute, to: 750 * minute });
  });

  it('stops at ten minutes and at the whole', () => {
    const short = zoomedSpan({ from: 0, to: 12 * minute }, whole, 0.5);
    expect(short.to - short.from).toBe(10 * minute);
    expect(zoomedSpan({ from: 100 * minute, to: 900 * minute }, whole, 2)).toEqual(whole);
  });

  it('moved beyond an end stays at that end with its length', () => {
    const shown = { from: 800 * minute, to: 950 * minute };
    expect(movedSpan(shown, whole, 0.5)).toEqual({ from: 850 * minute, to: whole.to });
    expect(movedSpan({ from: 10 * minute, to: 160 * minute }, whole, -0.5)).toEqual({
      from: 0,
      to: 150 * minute,
    });
  });

  it('is read from what ECharts reports, also when it starts at zero', () => {
    expect(spanShownBy({ dataZoom: [{ startValue: 0, endValue: 5 }] })).toEqual({ from: 0, to: 5 });
    expect(spanShownBy({ dataZoom: [] })).toBeNull();
    expect(spanShownBy(undefined)).toBeNull();
  });
});
