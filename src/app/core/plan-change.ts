import { hoursADay, type DailyLampHours } from '@shared/climate/daily-lamp-hours';
import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { Task } from '@shared/contracts/care';
import type { Shelf } from '@shared/contracts/rooms';
import { advisedLampHours } from '@shared/growing/advice/advised-lamp-hours';

/** A change of what is planned for a shelf, that advice asks for and a person may have just made by hand. */
export type PlanChange = { readonly shelfId: string; readonly label: string } & (
  | { readonly about: 'lamps'; readonly before: DailyLampHours; readonly after: DailyLampHours }
  | { readonly about: 'heatMat'; readonly before: boolean; readonly after: boolean }
);

/** A change of plan as a person is asked about it. */
export interface PlanQuestion {
  readonly title: string;
  readonly text: string;
  readonly confirm: string;
  readonly isDestructive: false;
}

/** What the plan of a shelf's lamps would become by its advice; null when it may stay, or nobody says how long. */
export function lampPlanChange(
  { id: shelfId, label, lampHours: before }: Shelf,
  { lamps }: ShelfAdviceView,
): PlanChange | null {
  const after = advisedLampHours(lamps, before);
  return after && { shelfId, label, about: 'lamps', before, after };
}

/** What is noted of a shelf's heat mat would become by its advice; null when it may stay. */
export function matPlanChange(
  { id: shelfId, label, heatMat }: Shelf,
  { heatMat: { change } }: ShelfAdviceView,
): PlanChange | null {
  if (heatMat === null || change === null) return null;
  return { shelfId, label, about: 'heatMat', before: heatMat.isOn, after: change === 'switchOn' };
}

/** Whether a task may go with a change of plan: it switches lamps or a heat mat. */
export function isSwitching({ kind }: Task): boolean {
  return kind === 'switchLamps' || kind === 'switchHeatMat';
}

/** The change of plan that goes with a task; null for none. */
export function planChangeOf(
  { kind, shelfId }: Task,
  shelves: readonly Shelf[],
  advice: ShelfAdviceView,
): PlanChange | null {
  const shelf = shelves.find(({ id }) => id === shelfId);
  if (shelf === undefined) return null;
  return kind === 'switchLamps' ? lampPlanChange(shelf, advice) : matPlanChange(shelf, advice);
}

/** Asks whether to make a change, and says what follows from it. */
export function planQuestion(change: PlanChange): PlanQuestion {
  const { label } = change;
  if (change.about === 'heatMat') {
    const [before, after] = [onOrOff(change.before), onOrOff(change.after)];
    return {
      title: `Note that the heat mat of ${label} is ${after}?`,
      text: `It is noted as ${before} so far, and advice goes by that.`,
      confirm: `Note it ${after}`,
      isDestructive: false,
    };
  }
  const after = lampHoursText(change.after);
  return {
    title: `Plan the lamps of ${label} ${after}?`,
    text:
      `They are planned ${lampHoursText(change.before)} so far. Charts, wanted ranges and alerts follow the new plan from now on. ` +
      'It switches nothing: the lamp’s timer must say the same. The shelf’s page takes any other hours.',
    confirm: `Plan ${after}`,
    isDestructive: false,
  };
}

/** What is planned still: "A3 lamps are still planned dark all day". */
export function stillPlanned(change: PlanChange): string {
  return change.about === 'lamps'
    ? `${change.label} lamps are still planned ${lampHoursText(change.before)}`
    : `${change.label} heat mat is still noted as ${onOrOff(change.before)}`;
}

/** What was planned: "A3 lamps are planned 06:00–18:00". */
export function nowPlanned(change: PlanChange): string {
  return change.about === 'lamps'
    ? `${change.label} lamps are planned ${lampHoursText(change.after)}`
    : `Noted: ${change.label} heat mat is ${onOrOff(change.after)}`;
}

/** Lamp hours as they stand after "planned": "06:00–18:00". */
function lampHoursText(daily: DailyLampHours): string {
  switch (hoursADay(daily)) {
    case 0:
      return 'dark all day';
    case 24:
      return 'lit all day';
    default:
      return `${daily.switchesOn}–${daily.switchesOff}`;
  }
}

function onOrOff(isOn: boolean): string {
  return isOn ? 'on' : 'off';
}
