import { inventedId } from '../../core/testing/board-builder';
import { depthAdvice, startedPlanting, startForm } from './start-fields';

const zone = 'Europe/Dublin';
const noFigures = {
  emergence: null,
  normalSeedlings: null,
  temperatures: [],
  thermalTimes: [],
  depthMm: null,
  light: null,
  lifeYears: [],
  minimumGerminationPct: null,
};

describe('a new planting', () => {
  it('needs a crop and a count', () => {
    const form = startForm();
    expect(form.invalid).toBe(true);
    expect(startedPlanting(form, zone)).toBeNull();
    form.patchValue({ cropId: 'leek', count: 0 });
    expect(form.controls.count.invalid).toBe(true);
    form.patchValue({ count: 40 });
    expect(form.valid).toBe(true);
  });

  it('sown of a lot leaves the crop to the lot, and the instant to the server', () => {
    const form = startForm();
    form.patchValue({ cropId: 'leek', lotId: inventedId(600), count: 40, depthMm: 6, container: ' Flat ' });
    expect(startedPlanting(form, zone)).toEqual({
      how: 'sown',
      lotId: inventedId(600),
      variety: null,
      count: 40,
      grams: null,
      depthMm: 6,
      shelfId: null,
      container: 'Flat',
      note: '',
      at: undefined,
    });
  });

  it('sown of no lot names its crop and takes no grams of any', () => {
    const form = startForm();
    form.patchValue({ cropId: 'leek', count: 40, grams: 2, at: '2026-11-21T10:00' });
    expect(startedPlanting(form, zone)).toMatchObject({
      cropId: 'leek',
      lotId: null,
      grams: null,
      at: '2026-11-21T10:00:00.000Z',
    });
  });

  it('brought in says where from and how far it is, and nothing of seed', () => {
    const form = startForm();
    form.patchValue({ how: 'broughtIn', cropId: 'bay', count: 1, source: 'Own cutting', stage: 'resting' });
    const sent = startedPlanting(form, zone);
    expect(sent).toMatchObject({ how: 'broughtIn', cropId: 'bay', source: 'Own cutting', stage: 'resting' });
    expect(sent).not.toHaveProperty('depthMm');
  });
});

describe('the depth to sow at', () => {
  const depth = { value: { low: 6, high: 13 }, source: 'Extension table' };

  it('begins in the middle of what is published', () => {
    expect(depthAdvice({ ...noFigures, depthMm: depth })).toEqual({
      depthMm: 10,
      words: '6 to 13 mm by Extension table.',
    });
  });

  it('is none for seed that needs light, whatever its size', () => {
    const light = { value: 'needed' as const, source: 'Seed handbook' };
    expect(depthAdvice({ ...noFigures, light }).depthMm).toBe(0);
    const shallow = { value: { low: 0, high: 3 }, source: 'x' };
    expect(depthAdvice({ ...noFigures, light, depthMm: shallow })).toEqual({
      depthMm: 0,
      words: '0 to 3 mm by x. It needs light: press it on, don’t cover it.',
    });
  });

  it('is not made up where nobody published one', () => {
    expect(depthAdvice(noFigures)).toEqual({ depthMm: null, words: 'No published depth.' });
    expect(depthAdvice(null).depthMm).toBeNull();
  });
});
