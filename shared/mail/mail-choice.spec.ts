import { mailDueAt, usualMailChoice, waitsForNoLetter, type MailChoice } from './mail-choice';

const zone = 'Europe/Dublin'; // GMT in winter, IST (UTC+1) from 29 March to 25 October 2026.
const nights: MailChoice = { ...usualMailChoice, quietHours: { from: '22:00', to: '07:00' } };
const noon: MailChoice = { ...usualMailChoice, quietHours: { from: '12:00', to: '13:30' } };
const at = (iso: string): number => Date.parse(iso);
const due = (choice: MailChoice, urgency: 'lookToday' | 'goNow', iso: string): string | null => {
  const instant = mailDueAt(choice, urgency, at(iso), zone);
  return instant === null ? null : new Date(instant).toISOString();
};

describe('a mail about an alert', () => {
  it.each([
    ['without quiet hours goes at once', usualMailChoice, '2026-01-10T03:00:00Z', '2026-01-10T03:00:00.000Z'],
    ['in the evening before quiet hours', nights, '2026-01-10T21:59:59Z', '2026-01-10T21:59:59.000Z'],
    [
      'as quiet hours begin, waits for the morning',
      nights,
      '2026-01-10T22:00:00Z',
      '2026-01-11T07:00:00.000Z',
    ],
    [
      'after midnight, waits for the same morning',
      nights,
      '2026-01-11T00:30:00Z',
      '2026-01-11T07:00:00.000Z',
    ],
    [
      'a second before they end, waits that second',
      nights,
      '2026-01-11T06:59:59Z',
      '2026-01-11T07:00:00.000Z',
    ],
    ['as they end, goes at once', nights, '2026-01-11T07:00:00Z', '2026-01-11T07:00:00.000Z'],
    ['in quiet hours within a day', noon, '2026-01-10T12:00:00Z', '2026-01-10T13:30:00.000Z'],
    ['outside quiet hours within a day', noon, '2026-01-10T13:30:00Z', '2026-01-10T13:30:00.000Z'],
    [
      'in the night when clocks go forward, 07:00 comes an hour sooner',
      nights,
      '2026-03-28T23:00:00Z',
      '2026-03-29T06:00:00.000Z',
    ],
    [
      'in the night when clocks go back, 07:00 comes an hour later',
      nights,
      '2026-10-24T23:00:00Z',
      '2026-10-25T07:00:00.000Z',
    ],
  ])('%s', (_title, choice, when, expected) => {
    expect(due(choice, 'lookToday', when)).toBe(expected);
  });

  it.each([
    [
      'that the clock skips lasts as much longer as it skips',
      '2026-03-29T00:15:00Z',
      '2026-03-29T01:30:00.000Z',
    ],
    ['that comes twice is the first', '2026-10-24T23:45:00Z', '2026-10-25T00:30:00.000Z'],
  ])('whose quiet hours end at 01:30, an end %s', (_title, when, expected) => {
    const short: MailChoice = { ...usualMailChoice, quietHours: { from: '23:00', to: '01:30' } };
    expect(due(short, 'lookToday', when)).toBe(expected);
  });

  it('that is urgent passes through quiet hours', () => {
    expect(due(nights, 'goNow', '2026-01-11T03:00:00Z')).toBe('2026-01-11T03:00:00.000Z');
  });

  it.each(['morningLetter', 'never'] as const)('that is wanted by %s is not sent by itself', (telling) => {
    expect(due({ ...nights, lookToday: telling }, 'lookToday', '2026-01-10T12:00:00Z')).toBeNull();
    expect(due({ ...nights, lookToday: telling }, 'goNow', '2026-01-10T12:00:00Z')).not.toBeNull();
  });
});

describe('a choice', () => {
  it.each([
    ['atOnce', null, false],
    ['morningLetter', null, true],
    ['morningLetter', '07:00', false],
    ['never', null, false],
  ] as const)('of %s with the letter at %s waits for no letter: %s', (lookToday, letterAt, expected) => {
    expect(waitsForNoLetter({ ...usualMailChoice, lookToday, letterAt })).toBe(expected);
  });
});
