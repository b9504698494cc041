import { describe, expect, it } from 'vitest';
import { hashPassword, passwordMatches } from './password';

describe('passwords', () => {
  it('are kept as argon2id with the memory, passes and lanes it should have', async () => {
    const hash = await hashPassword('tide and clamps');
    expect(hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(await passwordMatches('tide and clamps', hash)).toBe(true);
    expect(await passwordMatches('tide and clamp', hash)).toBe(false);
  });

  it('match nothing where there is no hash', async () => {
    expect(await passwordMatches('tide and clamps', null)).toBe(false);
    expect(await passwordMatches('', null)).toBe(false);
  });

  it('are all answered, however many come at once', async () => {
    const hash = await hashPassword('tide and clamps');
    const answers = await Promise.all(
      Array.from({ length: 12 }, (_, n) =>
        passwordMatches(n % 2 === 0 ? 'tide and clamps' : 'wrong', hash),
      ),
    );
    expect(answers).toEqual(Array.from({ length: 12 }, (_, n) => n % 2 === 0));
  });
});
