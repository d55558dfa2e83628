import { adviseShelf } from './shelf-advice';
import { shelf } from './shelf-in-words';

describe('sentences of advice', () => {
  it('tell why the lamps are on while a neighbour waits', () => {
    const { lamps } = adviseShelf(shelf('leek:emerging onion-long-day:sown'), []);

    expect(lamps.reason).toBe('Leek is up and wants 12–16 h of light, though Onion, long-day still waits.');
  });

  it('name both plantings of a conflict and the gap in °C', () => {
    const { conflicts } = adviseShelf(shelf('lettuce-head:seedling aubergine:seedling'), []);

    expect(conflicts[0]?.sentence).toBe(
      'Aubergine wants at least 21.1 °C (air with lamps on), Lettuce, head at most 18.3 °C: 2.8 °C apart.',
    );
  });

  it('name both sides of a heat mat', () => {
    const { heatMat } = adviseShelf(shelf('leek:emerging sweet-pepper:sown'), []);

    expect(heatMat.reason).toBe(
      'Leek is up and wants the heat mat off, Sweet pepper still waits and wants it on.',
    );
  });

  it('give wanted ranges the ends that decide, whose they are and who says so', () => {
    const { wanted } = adviseShelf(shelf('basil:growingOn chives:growingOn'), []);
    const day = wanted.find(({ quantity, when }) => quantity === 'airTemperature' && when === 'lampsOn');

    expect(day?.range).toEqual({ low: 18, high: 21 });
    expect(day?.reason).toBe('Basil growing on, Chives growing on');
    expect(day?.source).toMatch(/Currey.*from memory/);
  });

  it.each([
    ['celery:sown', {}, /Celery germinates in light only/],
    ['lettuce-head:sown', {}, /Lettuce, head germinates better in light/],
    ['coriander:sown leek:seedling', {}, /Coriander germinates better in the dark/],
  ])('note on "%s" what light does to seed', (plantings, more, note) => {
    expect(adviseShelf(shelf(plantings, more), []).notes.join()).toMatch(note);
  });

  it('note nothing on seed that does not care', () => {
    expect(adviseShelf(shelf('leek:sown'), []).notes).toEqual([]);
  });
});

describe('moves', () => {
  const conflict = shelf('leek:emerging sweet-pepper:sown');

  it('go to a shelf that fits both', () => {
    const a2 = shelf('', { label: 'A2' });

    expect(adviseShelf(conflict, [a2]).moves).toEqual([
      {
        shelf: 'A2',
        plantingIds: ['leek', 'sweet-pepper'],
        sentence: 'A2 fits both: move Leek or Sweet pepper there.',
      },
    ]);
  });

  it.each([
    ['chives fit leek, not a mat', 'chives:growingOn', {}, ['leek']],
    ['hot pepper seed fits pepper seed', 'hot-pepper:sown', {}, ['sweet-pepper']],
    ['no mat fits leek alone', '', { hasHeatMat: false }, ['leek']],
    ['no lamp fits seed alone', '', { hasLamp: false }, ['sweet-pepper']],
    ['a cold shelf is none for leek', '', { unheatedC: 8 }, ['sweet-pepper']],
    ['onions in leaf fit leek', 'onion-long-day:seedling', { lampHours: 13 }, ['leek']],
  ])('where %s go there alone', (_case, plantings, more, ids) => {
    const [move] = adviseShelf(conflict, [shelf(plantings, { label: 'B1', ...more })]).moves;

    expect(move?.plantingIds).toEqual(ids);
  });

  it('are not suggested to a shelf where they make a conflict or a warning', () => {
    const resting = shelf('citrus:resting', { label: 'B2', hasHeatMat: false });
    // Nothing here minds an onion, but the onion minds the sixteen hours.
    const long = shelf('lemongrass:growingOn', { label: 'B3', lampHours: 16 });
    const shorter = { ...long, lampHours: 13 };
    const onions = shelf('onion-long-day:seedling citrus:resting');

    expect(adviseShelf(conflict, [resting]).moves).toEqual([]);
    expect(adviseShelf(onions, [long]).moves).toEqual([]);
    expect(adviseShelf(onions, [shorter]).moves[0]?.plantingIds).toEqual(['onion-long-day']);
  });

  it('are not suggested where nothing is in conflict', () => {
    expect(adviseShelf(shelf('leek:emerging'), [shelf('', { label: 'A2' })]).moves).toEqual([]);
  });

  it('leave out plantings whose going settles nothing', () => {
    const three = shelf('leek:seedling chives:seedling sweet-pepper:sown');
    const [move] = adviseShelf(three, [shelf('', { label: 'A2' })]).moves;

    expect(move?.plantingIds).toEqual(['sweet-pepper']);
  });
});
