import { TestBed } from '@angular/core/testing';
import type { PlantHabit, PlantingStage } from '@shared/growing/planting-stage';
import fc from 'fast-check';
import { plantLook } from './crop-look';
import { PlantDrawing } from './plant-drawing';
import { plantPicture, type PlantFamily, type PlantForm } from './plant-forms';
import { PlantTray } from './plant-tray';
import { trayLayout, type TrayPlanting } from './tray-layout';

const forms: PlantForm[] = [
  'sown',
  'hook',
  'twoLeaves',
  'blades',
  'leafy',
  'bush',
  'fruiting',
  'tree',
  'resting',
  'empty',
];
const families: PlantFamily[] = [
  'leek',
  'onion',
  'pepper',
  'tomato',
  'herb',
  'strawberry',
  'citrus',
  'lettuce',
];

const planting: fc.Arbitrary<TrayPlanting> = fc.record({
  form: fc.constantFrom(...forms),
  family: fc.constantFrom(...families),
  count: fc.integer({ min: 0, max: 400 }),
  size: fc.double({ min: 0.1, max: 2, noNaN: true }),
});

describe('the drawing of a planting', () => {
  it.each<[string, PlantHabit, PlantFamily]>([
    ['Dwarf tomato', 'fruiting', 'tomato'],
    ['Pepper, sweet', 'fruiting', 'pepper'],
    ['Onion, long-day', 'blades', 'onion'],
    ['Leek', 'blades', 'leek'],
    ['Something new', 'tree', 'citrus'],
    ['Something new', 'berry', 'strawberry'],
  ])('of %s, which grows as %s, has the colours of %s', (crop, habit, family) => {
    expect(plantLook({ crop, habit, stage: 'growingOn' }).family).toBe(family);
  });

  it.each<[PlantHabit, PlantingStage, PlantForm]>([
    ['blades', 'sown', 'sown'],
    ['leafy', 'emerging', 'hook'],
    ['leafy', 'seedling', 'twoLeaves'],
    ['blades', 'seedling', 'blades'],
    ['fruiting', 'growingOn', 'leafy'],
    ['fruiting', 'fruiting', 'fruiting'],
    ['berry', 'fruiting', 'fruiting'],
    ['tree', 'fruiting', 'tree'],
    ['tree', 'resting', 'tree'],
    ['rosette', 'resting', 'resting'],
    ['leafy', 'ended', 'empty'],
  ])('of habit %s at stage %s is the form %s', (habit, stage, form) => {
    expect(plantLook({ crop: 'Any', habit, stage }).form).toBe(form);
  });

  it('fruits after its own family', () => {
    expect(plantPicture('fruiting', 'strawberry')).not.toBe(plantPicture('fruiting', 'tomato'));
    expect(plantPicture('fruiting', 'citrus')).toBe(plantPicture('tree', 'citrus'));
  });
});

describe('plants along a board', () => {
  it('keep to their own part of it and never overlap', () => {
    fc.assert(
      fc.property(fc.array(planting, { minLength: 1, maxLength: 12 }), (plantings) => {
        const { boards, plants } = trayLayout(plantings, 408);
        const end = boards.reduce((sum, { breadth }) => sum + breadth, 0);
        expect(end).toBeCloseTo(408, 6);
        plants.slice(1).forEach((plant, index) => {
          const before = plants[index];
          if (before === undefined) return;
          const reach = (p: typeof plant): number => (plantPicture(p.form, p.family).breadth * p.size) / 2;
          // A plant may vary by 4 % in size.
          expect(plant.x - before.x).toBeGreaterThanOrEqual((reach(plant) + reach(before)) / 1.05);
        });
      }),
    );
  });

  it('show at least one of each planting, however many there are', () => {
    const { plants } = trayLayout(
      [
        { form: 'sown', family: 'leek', count: 2000 },
        { form: 'tree', family: 'citrus', count: 1 },
      ],
      408,
    );
    expect(plants.filter(({ form }) => form === 'tree')).toHaveLength(1);
    expect(plants.length).toBeLessThan(60);
  });

  it('leave a small planting whole beside a flat of hundreds', () => {
    const { plants } = trayLayout(
      [
        { form: 'hook', family: 'leek', count: 7 },
        { form: 'sown', family: 'onion', count: 600 },
      ],
      408,
    );
    expect(plants.filter(({ form }) => form === 'hook')).toHaveLength(7);
  });

  it('are as many as there are where they find room', () => {
    expect(trayLayout([{ form: 'fruiting', family: 'tomato', count: 6 }], 408).plants).toHaveLength(6);
  });
});

describe('a plant tray', () => {
  const tray = async (plantings: TrayPlanting[]): Promise<HTMLElement> => {
    const fixture = TestBed.createComponent(PlantTray);
    fixture.componentRef.setInput('plantings', plantings);
    await fixture.whenStable();
    return fixture.nativeElement as HTMLElement;
  };

  it('draws a board for each planting and leaves the words to others', async () => {
    const host = await tray([
      { form: 'hook', family: 'leek', count: 3 },
      { form: 'sown', family: 'onion', count: 4 },
    ]);
    expect(host.getAttribute('aria-hidden')).toBe('true');
    expect(host.querySelectorAll('rect')).toHaveLength(2);
    expect(host.querySelectorAll('g.leek')).toHaveLength(3);
    expect(host.querySelectorAll('g.onion path').length).toBeGreaterThan(4);
  });

  it('with nothing on it is one bare board', async () => {
    const host = await tray([]);
    expect(host.querySelectorAll('rect')).toHaveLength(1);
    expect(host.querySelectorAll('g')).toHaveLength(0);
  });
});

describe('a single drawing', () => {
  it('is cropped to its plant', async () => {
    const fixture = TestBed.createComponent(PlantDrawing);
    fixture.componentRef.setInput('form', 'sown');
    fixture.componentRef.setInput('family', 'leek');
    await fixture.whenStable();
    const host = fixture.nativeElement as HTMLElement;
    expect(host.querySelector('svg')?.getAttribute('viewBox')).toBe('-5.5 -7 11 8');
    expect(host.querySelectorAll('path.seed')).toHaveLength(2);
  });
});
