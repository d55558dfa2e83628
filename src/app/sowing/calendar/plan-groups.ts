import type { SowingCalendar, SowingPlan } from '@shared/contracts/sowing';
import { daysBetween } from '@shared/growing/calendar-day';

/** Plans that belong together, in the order in which a person meets them. */
export interface PlanGroup {
  readonly title: string;
  /** Whether something is to be done about them this week. */
  readonly isDue: boolean;
  readonly plans: readonly SowingPlan[];
}

const soonDays = 35;
const titles = [
  'This week',
  'Open now',
  'In the next weeks',
  'Later',
  'Over for this spring',
  'Without a window',
];

/** Chosen crops by when they are to be sown: what this week asks for first. */
export function planGroups({ plans, thisWeek, today }: SowingCalendar): readonly PlanGroup[] {
  const dueIds = new Set(thisWeek.map(({ cropId }) => cropId));
  const rank = (plan: SowingPlan): number => {
    if (dueIds.has(plan.cropId)) return 0;
    if (plan.window === null) return 5;
    if (plan.standing === 'open') return 1;
    if (plan.standing === 'past') return 4;
    return daysBetween(today, nextSowing(plan, today) ?? plan.window.opens) <= soonDays ? 2 : 3;
  };
  return titles
    .map((title, index) => ({
      title,
      isDue: index === 0,
      plans: plans.filter((plan) => rank(plan) === index),
    }))
    .filter((group) => group.plans.length > 0);
}

/** The next day on which to sow, today included; null when none is left. */
export function nextSowing({ sowings }: Pick<SowingPlan, 'sowings'>, today: string): string | null {
  return sowings.find(({ on }) => on >= today)?.on ?? null;
}
