import {
  boundsOf,
  choiceOf,
  queryOf,
  reachesNow,
  spanWords,
  weekEndingAt,
  weekStartingAt,
} from './shelf-span';

const dublin = 'Europe/Dublin';
const now = Date.parse('2026-12-01T14:20:00Z');
const dates = (firstDay: string, lastDay: string) => ({ kind: 'dates', firstDay, lastDay }) as const;

describe('the span in the address', () => {
  it.each([
    [{ span: 'month' }, { kind: 'month' }],
    [{ from: '2026-11-01', to: '2026-11-07' }, dates('2026-11-01', '2026-11-07')],
    [{ span: 'day', from: '2026-11-01', to: '2026-11-07' }, { kind: 'day' }],
  ])('%j is read', (query, choice) => {
    expect(choiceOf(query)).toEqual(choice);
  });

  it.each([
    [{}],
    [{ span: 'fortnight' }],
    [{ from: '2026-11-07', to: '2026-11-01' }],
    [{ from: '2026-11-31', to: '2026-12-01' }],
    [{ from: '2026-11-01' }],
    [{ from: '1999-01-01', to: '2026-12-01' }],
  ])('%j is the week', (query) => {
    expect(choiceOf(query)).toEqual({ kind: 'week' });
  });

  it('reads back as it was written', () => {
    for (const choice of [{ kind: 'season' } as const, dates('2026-02-28', '2026-03-01')])
      expect(choiceOf(queryOf(choice))).toEqual(choice);
  });
});

describe('the instants of a span', () => {
  it('of a day are the last 24 hours', () => {
    expect(boundsOf({ kind: 'day' }, now, dublin)).toEqual({ from: now - 86_400_000, to: now });
  });

  it('of a week begin at the room’s midnight six days before', () => {
    const { from } = boundsOf({ kind: 'week' }, now, dublin);
    expect(new Date(from).toISOString()).toBe('2026-11-25T00:00:00.000Z');
  });

  it('begin at the room’s midnight on the other side of a change of the clocks', () => {
    const afterChange = Date.parse('2026-10-27T10:00:00Z');
    const { from } = boundsOf({ kind: 'week' }, afterChange, dublin);
    expect(new Date(from).toISOString()).toBe('2026-10-20T23:00:00.000Z');
  });

  it('of chosen dates hold the last day whole, but nothing to come', () => {
    const past = boundsOf(dates('2026-11-01', '2026-11-02'), now, dublin);
    expect([past.from, past.to].map((at) => new Date(at).toISOString())).toEqual([
      '2026-11-01T00:00:00.000Z',
      '2026-11-03T00:00:00.000Z',
    ]);
    expect(boundsOf(dates('2026-11-30', '2026-12-01'), now, dublin).to).toBe(now);
  });

  it('reach now unless chosen dates have passed', () => {
    expect(reachesNow({ kind: 'month' }, now, dublin)).toBe(true);
    expect(reachesNow(dates('2026-11-30', '2026-12-01'), now, dublin)).toBe(true);
    expect(reachesNow(dates('2026-11-29', '2026-11-30'), now, dublin)).toBe(false);
  });
});

describe('a span in words', () => {
  it.each([
    [dates('2026-11-01', '2026-11-07'), '1 to 7 Nov 2026'],
    [dates('2026-10-28', '2026-11-07'), '28 Oct to 7 Nov 2026'],
    [dates('2025-12-28', '2026-01-03'), '28 Dec 2025 to 3 Jan 2026'],
    [dates('2026-11-07', '2026-11-07'), '7 Nov 2026'],
    [{ kind: 'week' } as const, 'This week'],
  ])('%j is %s', (choice, words) => {
    expect(spanWords(choice)).toBe(words);
  });

  it('offers the week up to the last reading and from the first', () => {
    expect(weekEndingAt(now, dublin)).toEqual(dates('2026-11-25', '2026-12-01'));
    expect(weekStartingAt(now, dublin)).toEqual(dates('2026-12-01', '2026-12-07'));
  });
});
