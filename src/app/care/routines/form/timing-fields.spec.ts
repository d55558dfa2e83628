import { fillTimingFields, mindShownFields, timingFields, timingOf } from './timing-fields';

const startsOn = '2026-12-01'; // a Tuesday

describe('the fields that say when', () => {
  it.each([
    'FREQ=DAILY;INTERVAL=4',
    'FREQ=WEEKLY;INTERVAL=2;BYDAY=MO,TH',
    'FREQ=MONTHLY;BYMONTHDAY=31',
    'FREQ=MONTHLY;BYMONTHDAY=-1',
    'FREQ=MONTHLY;INTERVAL=2;BYDAY=-1SA',
    'FREQ=YEARLY;BYMONTH=3;BYMONTHDAY=1',
    'FREQ=DAILY;COUNT=10',
  ])('give back %s', (rule) => {
    const form = timingFields(startsOn);
    fillTimingFields(form, { how: 'calendar', rule, startsOn });
    expect(timingOf(form)).toEqual({ how: 'calendar', rule, startsOn });
  });

  it('name the weekday of a week without one', () => {
    const form = timingFields('2026-12-04');
    fillTimingFields(form, { how: 'calendar', rule: 'FREQ=WEEKLY', startsOn });
    expect(timingOf(form)).toEqual({ how: 'calendar', rule: 'FREQ=WEEKLY;BYDAY=TU', startsOn });
  });

  it('say what is wrong with a rule that somebody wrote', () => {
    const form = timingFields(startsOn);
    form.patchValue({ every: 'own', rule: 'FREQ=HOURLY' });
    expect(timingOf(form)).toBeNull();
    expect(form.controls.rule.getError('rule')).toContain('FREQ can’t be HOURLY');
  });

  it('that are not shown keep nothing from being sent', () => {
    const form = timingFields(startsOn);
    form.patchValue({ how: 'afterDoing', interval: 0, rule: 'nonsense' });
    mindShownFields(form);
    expect(form.valid).toBe(true);
    expect(timingOf(form)).toEqual({ how: 'afterDoing', everyDays: 4, startsOn });
    form.patchValue({ how: 'calendar' });
    mindShownFields(form);
    expect(form.controls.interval.invalid).toBe(true);
    expect(timingOf(form)).toBeNull();
  });
});
