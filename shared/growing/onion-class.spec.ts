import { onionClassesFor, onionFit } from './onion-class';

describe('onionClassesFor', () => {
  // Common practice, no source: long above 37–40°, short below 32–35°, intermediate between.
  it.each([
    [0, ['short']],
    [28, ['short']],
    [33, ['short', 'intermediate']],
    [36, ['intermediate']],
    [38, ['intermediate', 'long']],
    [45, ['long']],
    [-45, ['long']],
    [65, ['long']],
  ])('at %d° are %j', (latitude, classes) => {
    expect(onionClassesFor(latitude)).toEqual(classes);
  });
});

describe('onionFit', () => {
  it.each([
    ['long', 52, 'suits'],
    ['long', 28, 'daysTooShort'],
    ['long', 34, 'daysTooShort'],
    ['intermediate', 0, 'daysTooShort'],
    ['intermediate', 52, 'bulbsTooSoon'],
    ['short', 52, 'bulbsTooSoon'],
    ['short', -52, 'bulbsTooSoon'],
    ['short', 20, 'suits'],
  ] as const)('of a %s-day onion at %d° is %s', (onion, latitude, fit) => {
    const found = onionFit(onion, latitude, 2023);

    expect(found.fit).toBe(fit);
    expect(found.warning === null).toBe(fit === 'suits');
  });

  it('names the longest day where it never reaches what the onion needs', () => {
    // suncalc: 13.92 h at 28° on 21 June 2023.
    expect(onionFit('long', 28, 2023).warning).toContain('13.9');
  });
});
