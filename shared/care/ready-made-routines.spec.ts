import { cropLibrary } from '../growing/crops/crop-library';
import { readyMadeRoutines } from './ready-made-routines';
import { requireRule } from './recurrence';

describe('ready-made routines', () => {
  it.each(cropLibrary.map((crop) => [crop.id, crop] as const))(
    'give %s water in one way, and a look for pests',
    (_, crop) => {
      const offered = readyMadeRoutines(crop);
      expect(offered.filter(({ kind }) => kind === 'water')).toHaveLength(1);
      expect(offered.some(({ kind }) => kind === 'inspect')).toBe(true);
      expect(new Set(offered.map(({ id }) => id)).size).toBe(offered.length);
    },
  );

  it('say how, and recur by rules that are ones', () => {
    for (const crop of cropLibrary) {
      for (const { steps, timing } of readyMadeRoutines(crop)) {
        expect(steps.length).toBeGreaterThan(0);
        if (timing.how === 'calendar') expect(() => requireRule(timing.rule)).not.toThrow();
      }
    }
  });

  it('know a crop of the room’s own by its group', () => {
    const own = readyMadeRoutines({ id: '3d0b6f6c-0000-4000-8000-000000000001', group: 'solanums' });
    expect(own.map(({ id }) => id)).toEqual(
      expect.arrayContaining(['water-by-weight', 'feed-fruiting', 'pick-fruit']),
    );
  });
});
