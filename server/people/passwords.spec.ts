import { hashPassword, passwordMatches } from './passwords';

describe('a password', () => {
  it('matches its own hash and no other', async () => {
    const stored = await hashPassword('seven trays of leeks');

    expect(await passwordMatches('seven trays of leeks', stored)).toBe(true);
    expect(await passwordMatches('Seven trays of leeks', stored)).toBe(false);
  });

  it('never matches for a person who is not there', async () => {
    expect(await passwordMatches('seven trays of leeks', null)).toBe(false);
  });

  it('is hashed with Argon2id, at least 19 MiB, two passes and a salt of its own', async () => {
    const [first, second] = await Promise.all([hashPassword('same'), hashPassword('same')]);

    // PHC string format. Parameters: OWASP Password Storage Cheat Sheet, Argon2id.
    expect(first).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(first).not.toBe(second);
  });
});
