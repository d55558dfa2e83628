import { requireRule } from '@shared/care/recurrence';
import { readyMadeRoutines } from '@shared/care/ready-made-routines';
import type {
  ReadyMadeRoutineView,
  Routine,
  RoutineDraft,
  RoutineTiming,
  RoutineWho,
} from '@shared/contracts/care-routines';
import { DomainError } from '@shared/errors/domain-error';
import { dayAfter } from '@shared/growing/calendar-day';
import type { Crop } from '@shared/growing/crops/crop';
import { dayBounds } from '@shared/series/room-days';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { invalidField, notFound } from '../http/request-problem';
import type { CarePlaces } from './care-places';
import { peopleOf, type RoutineFilter, type RoutinesStore } from './routines-store';
import type { TaskPlanningService } from './task-planning-service';

/** What {@link RoutinesService} works with. */
export interface RoutinesParts {
  readonly transactions: Transactions;
  readonly routines: RoutinesStore;
  readonly planning: TaskPlanningService;
  readonly places: CarePlaces;
  readonly cropOf: (tx: Tx, roomId: string, cropId: string) => Promise<Crop | null>;
  readonly changes: RoomChanges;
  readonly now: Clock;
}

/** A routine may not begin longer ago. */
const OLDEST_START_YEARS = 10;

/** Care that recurs: what, where, when, how and by whom. */
export class RoutinesService {
  constructor(private readonly parts: RoutinesParts) {}

  /** The routines of a room that go on. */
  routinesOf(roomId: string, filter: RoutineFilter): Promise<Routine[]> {
    return this.parts.routines.routines(this.parts.transactions.plain, roomId, filter);
  }

  /**
   * Adds a routine and makes its tasks of the days ahead.
   *
   * @param by - Who adds it.
   * @param timeZone - Of the room.
   * @param draft - What recurs; a first day in the past makes no late tasks.
   * @returns The routine.
   * @throws {@link RequestProblem} 422 for a bad rule or start or somebody who can't do care, 404 for another room's place.
   */
  add(by: RoomAuthor, timeZone: string, draft: RoutineDraft): Promise<Routine> {
    const { changes } = this.parts;
    return changes.make(by, async (tx) => {
      const id = await this.create(tx, by.roomId, timeZone, draft);
      await this.parts.planning.planRoom(tx, by.roomId);
      const result = await this.parts.routines.routine(tx, by.roomId, id);
      return { result, action: 'routine.add', subjectId: id, detail: { ...draft } };
    });
  }

  /** Changes a routine; its open tasks from today on follow. */
  change(by: RoomAuthor, timeZone: string, routineId: string, draft: RoutineDraft): Promise<Routine> {
    const { changes, routines, planning } = this.parts;
    return changes.make(by, async (tx) => {
      await planning.hold(tx, by.roomId);
      await routines.lock(tx, by.roomId, routineId);
      await this.check(tx, by.roomId, timeZone, draft);
      await routines.change(tx, routineId, draft, this.today(timeZone));
      await planning.replan(tx, by.roomId, routineId);
      const result = await routines.routine(tx, by.roomId, routineId);
      return { result, action: 'routine.change', subjectId: routineId, detail: { ...draft } };
    });
  }

  /** Ends a routine; its open tasks go. */
  end(by: RoomAuthor, routineId: string): Promise<void> {
    const { changes, routines, planning, now } = this.parts;
    return changes.make(by, async (tx) => {
      await planning.hold(tx, by.roomId);
      const { kind, title } = await routines.routine(tx, by.roomId, routineId);
      await routines.end(tx, routineId, now());
      return { result: undefined, action: 'routine.end', subjectId: routineId, detail: { kind, title } };
    });
  }

  /** The care that a crop usually gets; 404 for a crop that the room does not know. */
  async readyMade(roomId: string, cropId: string): Promise<ReadyMadeRoutineView[]> {
    const crop = await this.parts.cropOf(this.parts.transactions.plain, roomId, cropId);
    if (crop === null) throw notFound('crop');
    return readyMadeRoutines(crop).map((routine) => ({ ...routine, steps: [...routine.steps] }));
  }

  /** Gives a planting some of the ready-made routines of its crop. */
  adopt(
    by: RoomAuthor,
    timeZone: string,
    plantingId: string,
    chosen: {
      readonly readyMadeIds: readonly string[];
      readonly who: RoutineWho;
      readonly startsOn?: string | undefined;
    },
  ): Promise<Routine[]> {
    const { changes, places, cropOf, routines, planning } = this.parts;
    const startsOn = chosen.startsOn ?? this.today(timeZone);
    return changes.make(by, async (tx) => {
      const cropId = await places.cropOf(tx, by.roomId, plantingId);
      const crop = cropId === null ? null : await cropOf(tx, by.roomId, cropId);
      const offered = crop === null ? [] : readyMadeRoutines(crop);
      const ids: string[] = [];
      for (const [index, readyMadeId] of chosen.readyMadeIds.entries()) {
        const found = offered.find(({ id }) => id === readyMadeId);
        if (found === undefined) {
          throw invalidField(`body.readyMadeIds.${index}`, 'is no routine of this crop');
        }
        const { id: _, timing, steps, ...rest } = found;
        ids.push(
          await this.create(tx, by.roomId, timeZone, {
            ...rest,
            steps: [...steps],
            timing: { ...timing, startsOn } as RoutineTiming,
            place: { at: 'planting', plantingId },
            who: chosen.who,
            skipsClosedDays: false,
          }),
        );
      }
      await planning.planRoom(tx, by.roomId);
      const adopted = await routines.routines(tx, by.roomId, { plantingId });
      const result = adopted.filter(({ id }) => ids.includes(id));
      const { readyMadeIds } = chosen;
      return { result, action: 'routine.adopt', subjectId: plantingId, detail: { readyMadeIds, startsOn } };
    });
  }

  private async create(tx: Tx, roomId: string, timeZone: string, draft: RoutineDraft): Promise<string> {
    await this.check(tx, roomId, timeZone, draft);
    return this.parts.routines.add(tx, roomId, draft, this.today(timeZone));
  }

  private async check(tx: Tx, roomId: string, timeZone: string, draft: RoutineDraft): Promise<void> {
    const { places } = this.parts;
    checkTiming(draft, this.today(timeZone));
    await places.requirePlace(tx, roomId, draft.place);
    const personIds = peopleOf(draft.who);
    if (new Set(personIds).size < personIds.length) {
      throw invalidField('body.who.personIds', 'names somebody twice');
    }
    const field = draft.who.how === 'person' ? 'body.who.personId' : 'body.who.personIds';
    await places.requireCarers(roomId, personIds, field);
  }

  private today(timeZone: string): string {
    return dayBounds(this.parts.now().getTime(), timeZone).date;
  }
}

function checkTiming({ timing, place }: RoutineDraft, today: string): void {
  if (timing.startsOn < dayAfter(today, -366 * OLDEST_START_YEARS)) {
    throw invalidField('body.timing.startsOn', `is more than ${OLDEST_START_YEARS} years ago`);
  }
  if (timing.how === 'byDrying' && place.at !== 'planting') {
    throw invalidField('body.timing.how', 'needs a planting: each dries in its own way');
  }
  if (timing.how !== 'calendar') return;
  try {
    requireRule(timing.rule);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw invalidField('body.timing.rule', error.message);
  }
}
