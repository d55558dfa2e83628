import { alert, board, boardShelf, inventedId, measure, task } from '../../core/testing/board-builder';
import { shelfAdvice } from '../../core/testing/advice-builder';
import { alertChanged, shelfAdvised, shelfMeasured, taskChanged } from './board-changes';

const otherRack = {
  id: inventedId(301),
  name: 'Rack B',
  note: '',
  shelves: [boardShelf({ id: inventedId(2), label: 'B1' })],
};

describe('a board', () => {
  it('takes new readings of one shelf and leaves the other racks as they are', () => {
    const before = board({ racks: [...board().racks, otherRack] });
    const now = { ...boardShelf().now, measures: [measure('airTemperature', 24)] };
    const after = shelfMeasured(now)(before);
    expect(after.racks[0]?.shelves[0]?.now.measures).toEqual([measure('airTemperature', 24)]);
    expect(after.racks[1]).toBe(otherRack);
  });

  it('takes other advice on one shelf', () => {
    const advice = shelfAdvice({ notes: ['Leave it uncovered.'] });
    const before = board({ racks: [...board().racks, otherRack] });
    const after = shelfAdvised(advice)(before);
    expect(after.racks[0]?.shelves[0]).toEqual({ ...boardShelf(), advice });
    expect(after.racks[1]).toBe(otherRack);
  });

  it('puts a new alert first and keeps the place of one it knows', () => {
    const second = alert({ id: inventedId(901), shelfLabel: 'B2' });
    const both = alertChanged(second)(board());
    expect(both.openAlerts.map(({ shelfLabel }) => shelfLabel)).toEqual(['B2', 'A1']);
    const seen = alertChanged(alert({ acknowledgedByName: 'Maren Oxley' }))(both);
    expect(seen.openAlerts.map(({ acknowledgedByName }) => acknowledgedByName)).toEqual([
      null,
      'Maren Oxley',
    ]);
  });

  it('drops an alert that has cleared', () => {
    expect(alertChanged(alert({ clearedAt: '2026-12-01T14:18:00Z' }))(board()).openAlerts).toEqual([]);
  });

  it('ticks a task in its place, adds one due today, drops one put off', () => {
    const done = task({ doneAt: '2026-12-01T14:00:00Z' });
    expect(taskChanged(done)(board()).tasks).toEqual([done]);
    const late = task({ id: inventedId(801), dueOn: '2026-11-30' });
    expect(taskChanged(late)(board()).tasks).toEqual([task(), late]);
    expect(taskChanged(task({ dueOn: '2026-12-02' }))(board()).tasks).toEqual([]);
  });
});
