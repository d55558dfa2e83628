import type { Task } from '@shared/contracts/care';
import type { FrostDates, SowingCalendar, SowingPlan as SowingPlanView } from '@shared/contracts/sowing';
import { dayAfter } from '@shared/growing/calendar-day';
import type { Crop } from '@shared/growing/crops/crop';
import { onionFit } from '@shared/growing/onion-class';
import { planSowing, sowingDue, sowingsInWindow, type SowingPlan } from '@shared/growing/sowing-plan';
import { transplantDates } from '@shared/growing/sowing-window';
import { dayBounds } from '@shared/series/room-days';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { OpenTasks } from '../care/open-tasks';
import type { Clock } from '../clock';
import type { CropsService } from '../crops/crops-service';
import type { Transactions, Tx } from '../database/transactions';
import { invalidField, notFound } from '../http/request-problem';
import type { PeopleService } from '../people/people-service';
import type { RoomsService } from '../rooms/rooms-service';
import type { RoomCalendar, SeedService } from '../seed/seed-service';
import { lotWords } from '../seed/seed-views';
import type { PlaceService } from './place-service';
import type { SowingStore, StoredChoice } from './sowing-store';

/** What {@link SowingService} works with. */
export interface SowingParts {
  readonly transactions: Transactions;
  readonly sowing: SowingStore;
  readonly place: PlaceService;
  readonly rooms: Pick<RoomsService, 'room'>;
  readonly crops: CropsService;
  readonly seed: SeedService;
  readonly people: Pick<PeopleService, 'membershipOf'>;
  readonly tasks: OpenTasks;
  readonly changes: RoomChanges;
  readonly now: Clock;
}

/** What every plan of a calendar is seen with. */
interface Season {
  readonly today: string;
  readonly frost: FrostDates;
  readonly latitudeDeg: number | null;
  readonly sown: ReadonlyMap<string, readonly string[]>;
}

/** Sowings of so many days back can lie in a window that has not closed. */
const LONGEST_WINDOW_DAYS = 400;

/** When to sow what for this place's last frost. */
export class SowingService {
  constructor(private readonly parts: SowingParts) {}

  /** The sowing calendar of a room. */
  async calendar(room: RoomCalendar): Promise<SowingCalendar> {
    const { transactions, sowing, place, rooms, now } = this.parts;
    const tx = transactions.plain;
    const today = dayBounds(now().getTime(), room.timeZone).date;
    const { latitudeDeg } = await rooms.room(room.id);
    const season: Season = {
      today,
      frost: await place.frostDates(room.id, tx),
      latitudeDeg,
      sown: await sowing.sownSince(tx, room.id, dayAfter(today, -LONGEST_WINDOW_DAYS)),
    };
    const plans: SowingPlanView[] = [];
    const thisWeek: SowingCalendar['thisWeek'] = [];
    for (const choice of await sowing.choices(tx, room.id)) {
      const crop = await this.parts.crops.crop(tx, room.id, choice.cropId);
      if (crop === null) continue;
      const plan = planOf(crop, choice, season);
      plans.push(await this.view(room, crop, { choice, plan, season }));
      const on = plan && sowingDue(plan, season.sown.get(crop.id) ?? [], today);
      if (plan !== null && on !== null) {
        thisWeek.push({ cropId: crop.id, cropName: crop.name, on, closes: plan.closes });
      }
    }
    return { today, frost: season.frost, latitudeDeg, plans: plans.sort(byOpening), thisWeek };
  }

  /** Puts a crop on the calendar; 404 when neither the library nor the room has it. */
  async choose(
    by: RoomAuthor,
    timeZone: string,
    cropId: string,
    everyDays: number | null,
  ): Promise<SowingCalendar> {
    const { changes, sowing } = this.parts;
    await changes.make(by, async (tx) => {
      await this.requireCrop(tx, by.roomId, cropId);
      await sowing.choose(tx, by.roomId, cropId, everyDays);
      return {
        result: undefined,
        action: 'sowing.choose',
        subjectId: by.roomId,
        detail: { cropId, everyDays },
      };
    });
    return this.calendar({ id: by.roomId, timeZone });
  }

  /** Takes a crop off the calendar. */
  async unchoose(by: RoomAuthor, timeZone: string, cropId: string): Promise<SowingCalendar> {
    const { changes, sowing } = this.parts;
    await changes.make(by, async (tx) => {
      await this.requireCrop(tx, by.roomId, cropId);
      await sowing.unchoose(tx, by.roomId, cropId);
      return { result: undefined, action: 'sowing.unchoose', subjectId: by.roomId, detail: { cropId } };
    });
    return this.calendar({ id: by.roomId, timeZone });
  }

  /**
   * Makes a care task of a sowing day.
   *
   * @param by - Who.
   * @param cropId - Of the calendar, else 404.
   * @param due - The day, and who is to do it.
   * @returns The task; the open one where there is one already.
   * @throws {@link RequestProblem} 422 for somebody who is no member.
   */
  async addTask(
    by: RoomAuthor,
    cropId: string,
    due: { readonly on: string; readonly personId: string | null },
  ): Promise<Task> {
    const { changes, sowing, tasks, people } = this.parts;
    if (due.personId !== null && (await people.membershipOf(due.personId, by.roomId)) === null) {
      throw invalidField('body.personId', 'is no member of this room');
    }
    return changes.make(by, async (tx) => {
      const crop = await this.requireCrop(tx, by.roomId, cropId);
      const choice = await sowing.lockChoice(tx, by.roomId, cropId);
      if (choice === null) throw notFound('crop on the sowing calendar');
      const result =
        choice.openTaskId === null
          ? await tasks.open(tx, {
              roomId: by.roomId,
              shelfId: null,
              kind: 'sow',
              title: `Sow ${crop.name}`,
              detail: depthWords(crop),
              dueOn: due.on,
              personId: due.personId,
            })
          : await tasks.task(tx, by.roomId, choice.openTaskId);
      await sowing.setTask(tx, by.roomId, cropId, result.id);
      return { result, action: 'sowing.task', subjectId: result.id, detail: { cropId, ...due } };
    });
  }

  private async requireCrop(tx: Tx, roomId: string, cropId: string): Promise<Crop> {
    const crop = await this.parts.crops.crop(tx, roomId, cropId);
    if (crop === null) throw notFound('crop');
    return crop;
  }

  private async view(
    room: RoomCalendar,
    crop: Crop,
    { choice, plan, season }: { choice: StoredChoice; plan: SowingPlan | null; season: Season },
  ): Promise<SowingPlanView> {
    const lots = await this.parts.seed.list(room, { withFinished: false, cropId: crop.id });
    return {
      cropId: crop.id,
      cropName: crop.name,
      everyDays: choice.everyDays,
      window: plan && { opens: plan.opens, closes: plan.closes },
      bySource: (plan?.bySource ?? []).map((window) => ({ ...window })),
      standing: plan?.standing ?? null,
      lastFrost: plan?.lastFrost ?? null,
      sowings: (plan?.sowings ?? []).map((on) => sowingOn(crop, on)),
      warnings: warningsOf(crop, plan, season),
      lots: lots
        .filter(({ left }) => left > 0)
        .map((lot) => ({
          lotId: lot.id,
          name: [lot.variety ?? lot.cropName, lotWords(lot)].join(', '),
          useFirst: lot.age.useFirst,
        })),
      sownOn: plan === null ? [] : sowingsInWindow(plan, season.sown.get(crop.id) ?? []),
      taskId: choice.openTaskId,
    };
  }
}

function planOf(crop: Crop, { everyDays }: StoredChoice, { frost, today }: Season): SowingPlan | null {
  return frost.lastSpring === null ? null : planSowing(crop.sowing, frost.lastSpring.on, today, everyDays);
}

function sowingOn(crop: Crop, on: string): SowingPlanView['sowings'][number] {
  const ready = transplantDates(crop.sowing, on);
  return {
    on,
    transplantFrom: ready?.earliest ?? null,
    transplantTo: ready?.latest ?? null,
    transplantSource: ready?.source ?? null,
  };
}

function warningsOf(crop: Crop, plan: SowingPlan | null, { frost, latitudeDeg, today }: Season): string[] {
  const response = crop.dayLength?.value;
  const onion = response?.kind === 'bulbs' ? response.onion : null;
  const misfit =
    onion === null || latitudeDeg === null
      ? null
      : onionFit(onion, latitudeDeg, Number(today.slice(0, 4))).warning;
  const missing =
    plan !== null
      ? null
      : frost.lastSpring === null
        ? 'Set the last spring frost of this place: the window is counted from it.'
        : `No figure was found for when to sow ${crop.name} against the last frost.`;
  return [missing, misfit].filter((warning) => warning !== null);
}

function depthWords({ seed }: Crop): string {
  const depth = seed?.depthMm?.value;
  if (depth === undefined) return '';
  if (depth.high === 0) return 'On the surface, uncovered.';
  return depth.low === depth.high ? `${depth.low} mm deep.` : `${depth.low}–${depth.high} mm deep.`;
}

/** By the day on which the window opens; those without one last, by name. */
function byOpening(one: SowingPlanView, other: SowingPlanView): number {
  const opens = (plan: SowingPlanView): string => plan.window?.opens ?? '9999';
  return opens(one) === opens(other)
    ? one.cropName.localeCompare(other.cropName, 'en')
    : opens(one).localeCompare(opens(other));
}
