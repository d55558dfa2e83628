import { adviceTasks } from './advice-tasks';
import { adviseShelf } from './shelf-advice';
import { shelf } from './shelf-in-words';
import type { AdvisedShelf } from './advice';

const tasksOn = (words: string, more: Partial<AdvisedShelf> = {}) => {
  const advised = shelf(words, more);
  return adviceTasks(advised, adviseShelf(advised, []));
};

describe('the care that advice asks for', () => {
  it('is lamps on as soon as the first is up, though its neighbour is not', () => {
    expect(tasksOn('leek:emerging onion-long-day:sown')).toEqual([
      {
        about: 'lamps',
        change: 'switchOn',
        kind: 'switchLamps',
        title: 'Switch A3 lamps on: Leek is up',
        detail: 'Leek is up and wants 12–16 h of light, though Onion, long-day still waits. 12 h a day.',
      },
    ]);
  });

  it('is the heat mat off once the last is up', () => {
    expect(tasksOn('sweet-pepper:seedling', { lampHours: 14, isHeatMatOn: true })).toMatchObject([
      { about: 'heatMat', change: 'switchOff', kind: 'switchHeatMat', title: 'Switch A3 heat mat off' },
    ]);
  });

  it('is the heat mat on for seed that waits for warmth', () => {
    expect(tasksOn('sweet-pepper:sown hot-pepper:sown')).toMatchObject([
      { change: 'switchOn', title: 'Switch A3 heat mat on: Sweet pepper and Hot pepper wait' },
    ]);
  });

  it.each([
    ['leek:seedling', 8, 'lengthen', 'Give A3 a longer day of light'],
    ['leek:seedling', 20, 'shorten', 'Give A3 a shorter day of light'],
    ['', 14, 'switchOff', 'Switch A3 lamps off'],
  ])('with "%s" under %d h is to %s them', (words, lampHours, change, title) => {
    expect(tasksOn(words, { lampHours })).toMatchObject([{ about: 'lamps', change, title }]);
  });

  describe('after days of too little light', () => {
    const shortage = {
      meanMolM2D: 7,
      missingMolM2D: 3,
      causes: [
        'The lamp may be worn: by its hours it gives 80 % of its first light.',
        'It may hang too high.',
      ],
    };
    const shortages = new Map([
      ['leek', shortage],
      ['sweet-pepper', { ...shortage, meanMolM2D: 8, missingMolM2D: 2 }],
    ]);
    const lit = { lampHours: 14, shortages };

    it('is a look at the lamp, with the greater shortage and what may be its cause', () => {
      expect(tasksOn('leek:seedling sweet-pepper:seedling', lit)).toEqual([
        {
          about: 'light',
          change: 'findMore',
          kind: 'inspect',
          title: 'Look at the lamp of A3: Leek and Sweet pepper get too little light',
          detail:
            '7.0 mol/m² a day for three days, 10.0 wanted. The lamp may be worn: by its hours it gives 80 % of its first light. It may hang too high.',
        },
      ]);
    });

    it('is the plan alone where that is too short, and nothing about a lamp that is not there', () => {
      const about = (more: Partial<AdvisedShelf>): string[] =>
        tasksOn('leek:seedling', { ...lit, ...more }).map((task) => task.about);
      expect(about({ lampHours: 8 })).toEqual(['lamps']);
      expect(about({ lampHours: 0 })).toEqual(['lamps']);
      expect(about({ hasLamp: false, lampHours: null })).toEqual([]);
    });
  });

  it('is nothing where all is as it should be, or the mat suits one and harms another', () => {
    expect(tasksOn('leek:seedling', { lampHours: 14 })).toEqual([]);
    expect(tasksOn('leek:seedling sweet-pepper:sown', { lampHours: 14 })).toEqual([]);
  });
});
