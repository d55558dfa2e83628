import { cropById } from './crops/crop-library';
import { likelyCausesOfLateness, type LateSowing } from './late-emergence';

function late(id: string, known: Partial<LateSowing> = {}): string[] {
  const seed = cropById(id)?.seed ?? null;
  if (seed === null) throw new Error(`no seed of ${id}`);
  const unknown = { meanC: null, maxC: null, depthMm: null, ageYears: null, isDark: null, coverage: 1 };
  return likelyCausesOfLateness({ seed, ...unknown, ...known });
}

describe('likelyCausesOfLateness', () => {
  it.each([
    ['sweet-pepper', { meanC: 17 }, /too cool/],
    ['lettuce-head', { meanC: 20, maxC: 36 }, /too hot/],
    ['onion-long-day', { ageYears: 2 }, /too old/],
    ['leek', { depthMm: 15 }, /too deep/],
    ['celery', { isDark: true }, /need light/],
    ['coriander', { isDark: false }, /need the dark/],
    ['leek', { coverage: 0.5 }, /not measured/],
  ] as const)('of %s with %j are headed by one that matches %s', (id, known, cause) => {
    const causes = late(id, known);

    expect(causes).toHaveLength(2);
    expect(causes[0]).toMatch(cause);
  });

  it('always leave water, and claim nothing for certain', () => {
    const all = late('lettuce-head', { meanC: 2, ageYears: 9, depthMm: 30, isDark: true, coverage: 0 });

    expect(late('leek')).toHaveLength(1);
    expect(all).toHaveLength(6);
    for (const cause of all) expect(cause).toContain('may');
  });

  it.each([
    ['sweet-pepper', { meanC: 22, maxC: 30 }],
    ['onion-long-day', { ageYears: 1, depthMm: 6, isDark: true }],
  ])('of %s with %j hold nothing against it', (id, known) => {
    expect(late(id, known)).toHaveLength(1);
  });
});
