import { sowingCalendar, sowingPlan } from '../testing/sowing-builder';
import { nextSowing, planGroups } from './plan-groups';

const today = '2026-12-01';
const from = (opens: string, closes: string, standing: 'notYet' | 'open' | 'past') => ({
  window: { opens, closes },
  standing,
  sowings: [{ on: opens, transplantFrom: null, transplantTo: null, transplantSource: null }],
});

describe('chosen crops', () => {
  it('stand under when they are to be sown', () => {
    const plans = [
      sowingPlan({ cropId: 'due', ...from('2026-12-05', '2026-12-30', 'notYet') }),
      sowingPlan({ cropId: 'open', ...from('2026-11-01', '2027-01-30', 'open') }),
      sowingPlan({ cropId: 'soon', ...from('2027-01-05', '2027-01-30', 'notYet') }),
      sowingPlan({ cropId: 'later', ...from('2027-01-06', '2027-03-30', 'notYet') }),
      sowingPlan({ cropId: 'over', ...from('2026-02-01', '2026-03-01', 'past') }),
      sowingPlan({ cropId: 'none', window: null, standing: null, sowings: [] }),
    ];
    const thisWeek = [{ cropId: 'due', cropName: 'Due', on: '2026-12-05', closes: '2026-12-30' }];
    const groups = planGroups(sowingCalendar({ today, plans, thisWeek }));
    expect(groups.map(({ title, plans: [plan] }) => [title, plan?.cropId])).toEqual([
      ['This week', 'due'],
      ['Open now', 'open'],
      ['In the next weeks', 'soon'],
      ['Later', 'later'],
      ['Over for this spring', 'over'],
      ['Without a window', 'none'],
    ]);
  });

  it('show no heading without a crop', () => {
    expect(planGroups(sowingCalendar()).map(({ title }) => title)).toEqual(['Later']);
  });

  it('have a next sowing among those that follow each other', () => {
    const sowings = ['2026-11-20', '2026-12-01', '2026-12-12'].map((on) => ({
      on,
      transplantFrom: null,
      transplantTo: null,
      transplantSource: null,
    }));
    expect(nextSowing({ sowings }, today)).toBe('2026-12-01');
    expect(nextSowing({ sowings }, '2026-12-13')).toBeNull();
  });
});
