import type { CareKind } from '../../care/care-kind';
import { formatNumber } from '../../format/numbers';
import type { AdvisedShelf } from './advice';
import { agreeing, hoursOf, namesOf } from './sentences';
import type { ShelfAdvice } from './shelf-advice';
import { isPresent, isUp, isWaiting } from './standing-planting';

/** What a task of advice is about. */
export const adviceSubjects = ['lamps', 'heatMat', 'light'] as const;
/** One of {@link adviceSubjects}. */
export type AdviceSubject = (typeof adviceSubjects)[number];

/** A piece of care that advice asks for. */
export interface AdviceTask {
  readonly about: AdviceSubject;
  /** What to change: the same advice asks once, however often it is worked out. */
  readonly change: string;
  readonly kind: CareKind;
  readonly title: string;
  readonly detail: string;
}

/**
 * The care that advice on a shelf asks for.
 *
 * @param shelf - The shelf.
 * @param advice - On it.
 * @returns At most one task for the lamps, one for the heat mat and one for a shortage of light.
 */
export function adviceTasks(shelf: AdvisedShelf, advice: ShelfAdvice): AdviceTask[] {
  return [lampTask(shelf, advice), matTask(shelf, advice), lightTask(shelf, advice)].filter(
    (task) => task !== null,
  );
}

function lampTask({ label, plantings }: AdvisedShelf, { lamps }: ShelfAdvice): AdviceTask | null {
  const { change, hours, reason } = lamps;
  if (change === null) return null;
  const up = plantings.filter(isUp);
  const aDay = hours === null ? '' : ` ${hoursOf(hours)} a day.`;
  const titles = {
    switchOn: `Switch ${label} lamps on: ${namesOf(up)} ${agreeing(up, 'is', 'are')} up`,
    switchOff: `Switch ${label} lamps off`,
    lengthen: `Give ${label} a longer day of light`,
    shorten: `Give ${label} a shorter day of light`,
  };
  return { about: 'lamps', change, kind: 'switchLamps', title: titles[change], detail: reason + aDay };
}

function matTask({ label, plantings }: AdvisedShelf, { heatMat }: ShelfAdvice): AdviceTask | null {
  const { change, reason } = heatMat;
  if (change === null) return null;
  const waiting = plantings.filter((planting) => isPresent(planting) && isWaiting(planting));
  const title =
    change === 'switchOn'
      ? `Switch ${label} heat mat on: ${namesOf(waiting)} ${agreeing(waiting, 'waits', 'wait')}`
      : `Switch ${label} heat mat off`;
  return { about: 'heatMat', change, kind: 'switchHeatMat', title, detail: reason };
}

/** Where the plan itself is too short, or there is no lamp, that is the care to ask for, or the conflict. */
function lightTask(
  { label, plantings, hasLamp, shortages }: AdvisedShelf,
  { lamps: { change } }: ShelfAdvice,
): AdviceTask | null {
  if (!hasLamp || change === 'switchOn' || change === 'lengthen') return null;
  const short = plantings.filter(({ id }) => shortages.has(id));
  const [worst] = [...shortages.values()].sort((one, other) => other.missingMolM2D - one.missingMolM2D);
  if (worst === undefined) return null;
  const got = formatNumber(worst.meanMolM2D, 1);
  const wanted = formatNumber(worst.meanMolM2D + worst.missingMolM2D, 1);
  return {
    about: 'light',
    change: 'findMore',
    kind: 'inspect',
    title: `Look at the lamp of ${label}: ${namesOf(short)} ${agreeing(short, 'gets', 'get')} too little light`,
    detail: `${got} mol/m² a day for three days, ${wanted} wanted. ${worst.causes.join(' ')}`,
  };
}
