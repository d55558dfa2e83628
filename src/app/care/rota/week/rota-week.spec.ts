import type { Task } from '@shared/contracts/care';
import type { DutyDay } from '@shared/contracts/care-rota';
import { dayAfter } from '@shared/growing/calendar-day';
import { inventedId, task } from '../../../core/testing/board-builder';
import { rotaWeek, type RotaRow } from './rota-week';

const jo = { personId: inventedId(170), name: 'Jo Ashdown' };
const idris = { personId: inventedId(171), name: 'Idris Vane' };
const monday = '2026-11-30';
const today = '2026-12-01';

const week: DutyDay[] = Array.from({ length: 7 }, (_, index) => ({
  day: dayAfter(monday, index),
  isClosed: false,
  onDuty: index === 1 ? [jo] : [],
  absent: index === 2 ? [jo] : [],
  isException: false,
  note: '',
}));

/** Where each task stands: "Jo Ashdown 2026-12-01: Feed". */
function places(rows: readonly RotaRow[]): string[] {
  return rows.flatMap(({ kind, person, cells }) =>
    cells.flatMap(({ day, tasks }) => tasks.map(({ title }) => `${person?.name ?? kind} ${day}: ${title}`)),
  );
}
const shown = (tasks: Task[], onDay = today): string[] => places(rotaWeek(week, tasks, [jo, idris], onDay));

describe('a week of the rota', () => {
  it('has what is due with who holds it', () => {
    expect(shown([task({ title: 'Feed', dueOn: '2026-12-03' })])).toEqual(['Jo Ashdown 2026-12-03: Feed']);
  });

  it('has what is late on today, and in a week that is over where it was due', () => {
    const late = task({ title: 'Feed', dueOn: monday });
    expect(shown([late, task({ title: 'Wash', dueOn: '2026-11-20' })])).toEqual([
      'Jo Ashdown 2026-12-01: Wash',
      'Jo Ashdown 2026-12-01: Feed',
    ]);
    expect(shown([late], '2026-12-10')).toEqual([`Jo Ashdown ${monday}: Feed`]);
  });

  it('has what is done with who did it, on the day it was due', () => {
    const done = { outcome: 'done', doneAt: '2026-12-01T09:00:00Z' } as const;
    expect(
      shown([
        task({ title: 'Feed', dueOn: monday, ...done, doneById: idris.personId, doneByName: idris.name }),
      ]),
    ).toEqual([`Idris Vane ${monday}: Feed`]);
  });

  it('begins with what is short of hands; half a pair stands in both lines', () => {
    expect(
      shown([
        task({ title: 'Lift', cover: 'short' }),
        task({ title: 'Feed', cover: 'uncovered', holders: [], dueOn: '2026-12-02' }),
      ]),
    ).toEqual(['uncovered 2026-12-01: Lift', 'uncovered 2026-12-02: Feed', 'Jo Ashdown 2026-12-01: Lift']);
  });

  it('has a line for what is anybody’s only where there is some', () => {
    const kinds = (tasks: Task[]): string[] => rotaWeek(week, tasks, [], today).map(({ kind }) => kind);
    expect(kinds([])).toEqual([]);
    expect(kinds([task({ cover: 'anybody', holders: [] })])).toEqual(['anybody']);
  });

  it('says on which days somebody is on duty or away', () => {
    const cells = rotaWeek(week, [], [jo], today)[0]?.cells ?? [];
    expect(cells.filter(({ isOnDuty }) => isOnDuty).map(({ day }) => day)).toEqual([today]);
    expect(cells.filter(({ isAway }) => isAway).map(({ day }) => day)).toEqual(['2026-12-02']);
  });

  it('shows a pair with both', () => {
    expect(shown([task({ title: 'Lift', holders: [jo, idris] })])).toHaveLength(2);
  });
});
