import { inventedId } from '../../../core/testing/board-builder';
import { routine } from '../../testing/routine-builder';
import { fillRoutineForm, routineDraftOf, routineForm } from './routine-fields';

const today = '2026-12-01'; // a Tuesday
const [pia, ravi] = [inventedId(170), inventedId(171)];

describe('the fields of a routine', () => {
  it('need a title, and begin with every three days for whoever is on duty', () => {
    const form = routineForm(today);
    expect(routineDraftOf(form)).toBeNull();
    form.patchValue({ title: ' Water ', steps: ' Lift a pot \n\n Fill the flat' });
    expect(routineDraftOf(form)).toEqual({
      kind: 'water',
      title: 'Water',
      detail: '',
      place: { at: 'room' },
      timing: { how: 'calendar', rule: 'FREQ=DAILY;INTERVAL=3', startsOn: today },
      season: null,
      windowDays: 0,
      steps: ['Lift a pot', 'Fill the flat'],
      amount: '',
      who: { how: 'onDuty' },
      skipsClosedDays: false,
      minutes: 10,
    });
  });

  it.each([
    routine(),
    routine({
      kind: 'feed',
      place: { at: 'planting', plantingId: inventedId(500) },
      timing: { how: 'byDrying', fallbackDays: 5, startsOn: '2026-10-01' },
      season: { fromMonth: 10, toMonth: 3 },
      windowDays: 2,
      steps: ['Mix', 'Pour'],
      amount: '1 L',
      who: { how: 'inTurn', personIds: [ravi, pia] },
      skipsClosedDays: true,
      minutes: 25,
      detail: 'Never a dry pot',
    }),
    routine({
      place: { at: 'rack', rackId: inventedId(300) },
      timing: { how: 'afterDoing', everyDays: 14, startsOn: '2026-10-01' },
      who: { how: 'person', personId: pia },
    }),
    routine({ place: { at: 'room' }, placeLabel: null, who: { how: 'pair', personIds: [pia, ravi] } }),
  ])('give back a routine as it is: $timing.how for $who.how', (given) => {
    const form = routineForm(today);
    fillRoutineForm(form, given);
    const { id: _, placeLabel: _label, nextDueOn: _next, ...draft } = given;
    expect(routineDraftOf(form)).toEqual(draft);
  });

  it.each([
    ['person', { personId: null }, { personId: pia }],
    ['inTurn', { personIds: [pia] }, { personIds: [pia, ravi] }],
    ['pair', { personIds: [pia] }, { personIds: [pia, ravi] }],
  ] as const)('want enough people for %s', (how, tooFew, enough) => {
    const form = routineForm(today);
    form.patchValue({ title: 'Water' });
    form.controls.who.patchValue({ how, ...tooFew } as never);
    expect(routineDraftOf(form)).toBeNull();
    form.controls.who.patchValue(enough as never);
    expect(routineDraftOf(form)?.who).toEqual({ how, ...enough });
  });

  it('want a planting for care by drying', () => {
    const form = routineForm(today);
    form.patchValue({ title: 'Water', timing: { how: 'byDrying' }, place: `shelf:${inventedId(1)}` });
    expect(form.hasError('drying')).toBe(true);
    expect(routineDraftOf(form)).toBeNull();
    form.patchValue({ place: `planting:${inventedId(500)}` });
    expect(routineDraftOf(form)?.timing).toEqual({ how: 'byDrying', fallbackDays: 3, startsOn: today });
  });

  it('take no more steps than a list can show', () => {
    const form = routineForm(today);
    form.patchValue({ title: 'Water', steps: Array.from({ length: 21 }, () => 'step').join('\n') });
    expect(form.controls.steps.hasError('tooMany')).toBe(true);
    form.patchValue({ steps: 'x'.repeat(201) });
    expect(form.controls.steps.hasError('tooLong')).toBe(true);
  });
});
