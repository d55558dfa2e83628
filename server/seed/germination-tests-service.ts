import type { SeedLotDetail } from '@shared/contracts/seed';
import { daysBetween } from '@shared/growing/calendar-day';
import { dayBounds } from '@shared/series/room-days';
import type { RoomAuthor } from '../audit/room-author';
import type { Clock } from '../clock';
import { invalidField } from '../http/request-problem';
import type { GerminationTestsStore, StoredTest } from './germination-tests-store';
import type { SeedService } from './seed-service';

/** A test may last so many days; what has not germinated by then will not. */
const LONGEST_TEST_DAYS = 366;

/** Germination tests: seeds of a lot on damp paper, and how many germinated by which day. */
export class GerminationTestsService {
  constructor(
    private readonly tests: GerminationTestsStore,
    private readonly seed: SeedService,
    private readonly now: Clock,
  ) {}

  /** Begins a test; its seeds are taken from the lot. */
  add(
    by: RoomAuthor,
    timeZone: string,
    lotId: string,
    test: Pick<StoredTest, 'startedOn' | 'seeds' | 'note'>,
  ): Promise<SeedLotDetail> {
    this.requirePast('body.startedOn', test.startedOn, timeZone);
    return this.seed.lotNoted(by, timeZone, lotId, 'germination-test.add', test, async (tx) => {
      const testId = await this.tests.add(tx, { ...test, lotId });
      await this.seed.take(tx, by, lotId, {
        seeds: test.seeds,
        grams: null,
        reason: 'tested',
        at: new Date(dayBounds(test.startedOn, timeZone).start),
        testId,
        field: 'body.seeds',
      });
    });
  }

  /** Notes how many had germinated by a day; fewer than on an earlier day, or more than on a later one, is refused. */
  count(
    by: RoomAuthor,
    timeZone: string,
    lotId: string,
    testId: string,
    count: { readonly on: string; readonly up: number },
  ): Promise<SeedLotDetail> {
    this.requirePast('body.on', count.on, timeZone);
    return this.seed.lotNoted(
      by,
      timeZone,
      lotId,
      'germination-test.count',
      { testId, ...count },
      async (tx) => {
        const test = await this.tests.lock(tx, lotId, testId);
        const day = daysBetween(test.startedOn, count.on);
        requirePossible(test, day, count.up);
        await this.tests.count(tx, testId, day, count.up);
      },
    );
  }

  /** Removes a test; its seeds go back to the lot. */
  remove(by: RoomAuthor, timeZone: string, lotId: string, testId: string): Promise<SeedLotDetail> {
    return this.seed.lotNoted(by, timeZone, lotId, 'germination-test.remove', { testId }, async (tx) => {
      await this.tests.lock(tx, lotId, testId);
      await this.tests.remove(tx, testId);
    });
  }

  private requirePast(field: string, day: string, timeZone: string): void {
    if (day > dayBounds(this.now().getTime(), timeZone).date) throw invalidField(field, 'is still to come');
  }
}

function requirePossible({ startedOn, seeds, counts }: StoredTest, day: number, up: number): void {
  if (day < 0) throw invalidField('body.on', `is before the test was begun, ${startedOn}`);
  if (day > LONGEST_TEST_DAYS) throw invalidField('body.on', 'is more than a year after the test was begun');
  if (up > seeds) throw invalidField('body.up', `is more than the ${seeds} seeds of the test`);
  const before = counts.filter((count) => count.day < day).at(-1);
  if (before !== undefined && up < before.up) {
    throw invalidField('body.up', `is fewer than the ${before.up} of day ${before.day}`);
  }
  const after = counts.find((count) => count.day > day);
  if (after !== undefined && up > after.up) {
    throw invalidField('body.up', `is more than the ${after.up} of day ${after.day}`);
  }
}
