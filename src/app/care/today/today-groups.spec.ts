import { account } from '../../core/testing/account-builder';
import { inventedId, task } from '../../core/testing/board-builder';
import type { ShownTask } from '../../core/care/with-waiting';
import { todayGroups } from './today-groups';

const self = account().id;
const jo = [{ personId: inventedId(9), name: 'Jo Ashdown' }];
const mine = [{ personId: self, name: 'Maren Oxley' }];
const ids = (tasks: readonly ShownTask[]): string[] => tasks.map(({ task: { id } }) => id);
let count = 0;
function shown(changes: Parameters<typeof task>[0]): ShownTask {
  return {
    task: task({ id: inventedId((count += 1)), holders: jo, ...changes }),
    isWaiting: false,
    waitingPhotos: 0,
  };
}
const groups = (...tasks: ShownTask[]) => todayGroups(tasks, '2026-12-01', self);

describe('the tasks of a day', () => {
  it('stand under whose they are, and what nobody has under that', () => {
    const [own, pair, nobodys, short, free, held] = [
      shown({ holders: mine }),
      shown({ holders: [...mine, ...jo], cover: 'held' }),
      shown({ holders: [], cover: 'uncovered' }),
      shown({ cover: 'short' }),
      shown({ holders: [], cover: 'anybody' }),
      shown({}),
    ] as const;
    const found = groups(own, pair, nobodys, short, free, held);
    expect(ids(found.mine)).toEqual(ids([own, pair]));
    expect(ids(found.uncovered)).toEqual(ids([nobodys, short]));
    expect(ids(found.anybodys)).toEqual(ids([free]));
    expect(ids(found.others)).toEqual(ids([held]));
  });

  it('put what is late before what is due, and keep their place when they are done', () => {
    const [due, late] = [
      shown({ holders: mine, title: 'A' }),
      shown({ holders: mine, title: 'B', inTimeUntil: '2026-11-29' }),
    ] as const;
    expect(ids(groups(due, late).mine)).toEqual(ids([late, due]));
    const done = { ...late, task: { ...late.task, outcome: 'done' as const } };
    const found = groups(due, done);
    expect(ids(found.mine)).toEqual(ids([late, due]));
    expect(found).toMatchObject({ dueCount: 2, closedCount: 1 });
  });

  it('keep tomorrow apart, and leave out what a later turn made up for', () => {
    const later = shown({ dueOn: '2026-12-02' });
    const found = groups(later, shown({ outcome: 'missed' }));
    expect(ids(found.tomorrow)).toEqual(ids([later]));
    expect(found.dueCount).toBe(0);
  });
});
