/** Letters and digits that nobody mistakes for another: no 0 O, 1 I L, 2 Z, 5 S, 8 B, U V. */
export const PAIRING_ALPHABET = 'ACDEFGHJKMNPQRTWXY34679';
export const PAIRING_LENGTH = 6;

/** A code as a display shows it: K7M-4QX. */
export function shownCode(code: string): string {
  return `${code.slice(0, 3)}-${code.slice(3)}`;
}

/** A code as people type it, without hyphens and spaces and in capitals; null when it cannot be one. */
export function readCode(typed: string): string | null {
  if (typed.length > 40) return null;
  const code = typed.replace(/[\s\-\u2010-\u2015]/gu, '').toUpperCase();
  const known = [...code].every((letter) => PAIRING_ALPHABET.includes(letter));
  return code.length === PAIRING_LENGTH && known ? code : null;
}
