import type { FrostDates, SowingCalendar, SowingPlan } from '@shared/contracts/sowing';

/** Frost dates of an invented place: a tenth of the springs has frost after 12 May. */
export function frostDates(changes: Partial<FrostDates> = {}): FrostDates {
  return {
    lastSpring: { on: '05-12', wording: { kind: 'probability', percent: 10 } },
    firstAutumn: null,
    note: '',
    lastSpringRisk: 0.1,
    firstAutumnRisk: null,
    explanation: ['Last frost: In 10 of 100 springs frost still comes after it.'],
    ...changes,
  };
}

/** Leeks, to be sown from 3 February to 17 March. */
export function sowingPlan(changes: Partial<SowingPlan> = {}): SowingPlan {
  return {
    cropId: 'leek',
    cropName: 'Leek',
    everyDays: null,
    window: { opens: '2027-02-03', closes: '2027-03-17' },
    bySource: [{ source: 'garden lists (weak)', opens: '2027-02-03', closes: '2027-03-03' }],
    standing: 'notYet',
    lastFrost: '2027-05-12',
    sowings: [
      {
        on: '2027-02-03',
        transplantFrom: '2027-03-31',
        transplantTo: '2027-04-28',
        transplantSource: 'Extension table',
      },
    ],
    warnings: [],
    lots: [],
    sownOn: [],
    taskId: null,
    ...changes,
  };
}

/** A calendar of one crop on 1 December 2026. */
export function sowingCalendar(changes: Partial<SowingCalendar> = {}): SowingCalendar {
  return {
    today: '2026-12-01',
    frost: frostDates(),
    latitudeDeg: 53.3,
    plans: [sowingPlan()],
    thisWeek: [],
    ...changes,
  };
}
