import { usualMailChoice, waitsForNoLetter, type MailChoice } from './mail-choice';
import { isStopped, mailStops, withoutMails } from './mail-stop';

const everything: MailChoice = {
  lookToday: 'morningLetter',
  goNow: 'atOnce',
  cleared: true,
  care: true,
  quietHours: { from: '22:00', to: '07:00' },
  letterAt: '06:30',
  letterOnlyWithNews: false,
};

describe('stopping a kind of mail', () => {
  it.each([
    ['lookToday', { ...everything, lookToday: 'never' }],
    ['alerts', { ...everything, lookToday: 'never', goNow: 'never' }],
    ['cleared', { ...everything, cleared: false }],
    ['care', { ...everything, care: false }],
    ['letter', { ...everything, letterAt: null, lookToday: 'never' }],
  ] as const)('%s leaves all others as they were', (stop, expected) => {
    expect(withoutMails(everything, stop)).toEqual(expected);
  });

  it.each(mailStops)('%s is done once, and leaves a choice that can be kept', (stop) => {
    const once = withoutMails(everything, stop);
    expect(isStopped(everything, stop)).toBe(false);
    expect(isStopped(once, stop)).toBe(true);
    expect(withoutMails(once, stop)).toEqual(once);
    expect(waitsForNoLetter(once)).toBe(false);
  });

  it('does not count as done where only some of it was never wanted', () => {
    expect(isStopped({ ...usualMailChoice, lookToday: 'never' }, 'alerts')).toBe(false);
  });
});
