import { describe, expect, it } from 'vitest';
import { PAIRING_ALPHABET, readCode, shownCode } from './pairing-code';

describe('pairing codes', () => {
  it.each(['K7M-4QX', 'k7m4qx', ' k7m 4qx ', 'K7M–4QX'])('reads %j', (typed) => {
    expect(readCode(typed)).toBe('K7M4QX');
  });

  it.each(['', 'K7M4Q', 'K7M4QXX', 'K7M4Q0', 'K'.repeat(10_000), 'K7M\u00004Q'])(
    'does not take %j for a code',
    (typed) => {
      expect(readCode(typed)).toBeNull();
    },
  );

  it('reads what it shows', () => {
    const code = PAIRING_ALPHABET.slice(0, 6);
    expect(readCode(shownCode(code))).toBe(code);
  });

  it('draws from more than a hundred million codes', () => {
    expect(new Set(PAIRING_ALPHABET).size ** 6).toBeGreaterThan(1e8);
  });
});
