import { describe, expect, it } from 'vitest';
import { conflictSentence, problemSentence, type GeneralProblem } from './problem-words';

const single: Record<
  Exclude<GeneralProblem['code'], 'REFERENCE_TAKEN' | 'CLAMPS_IN_USE' | 'TRY_LATER'>,
  RegExp
> = {
  NOT_FOUND: /not in your shop/,
  VERSION_CONFLICT: /changed this while you were at it/,
  IDEMPOTENCY_MISMATCH: /new key/,
  WRONG_PASSWORD: /do not belong together/,
  EMAIL_TAKEN: /Sign in instead/,
  NO_SHOP: /Ask its owner/,
  NAME_TAKEN: /different one/,
  CODE_WRONG: /Read it again/,
  CODE_USED: /new one/,
  CODE_EXPIRED: /new one/,
  TOO_MANY_CODES: /ten minutes/,
};

describe('what a person reads about a problem', () => {
  it.each(Object.entries(single))('%s says the way out', (code, expected) => {
    const sentence = problemSentence({ code } as GeneralProblem);
    expect(sentence).toMatch(expected);
    expect(sentence).toMatch(/^[A-Z].*\.$/);
  });

  it('counts seconds, orders and clamps', () => {
    expect(problemSentence({ code: 'TRY_LATER', seconds: 1 })).toBe(
      'Too many tries. Wait a second, then try again.',
    );
    expect(problemSentence({ code: 'TRY_LATER', seconds: 8 })).toBe(
      'Too many tries. Wait 8 seconds, then try again.',
    );
    expect(problemSentence({ code: 'REFERENCE_TAKEN', orderCode: 'O-7' })).toMatch(/^Order O-7 /);
    const inUse = { code: 'CLAMPS_IN_USE', count: 1 } as const;
    expect(problemSentence({ ...inUse, change: 'LENGTH' })).toMatch(/^1 clamp is in use/);
    expect(problemSentence({ ...inUse, count: 3, change: 'COUNT' })).toMatch(/at least 3 until/);
    expect(problemSentence({ ...inUse, change: 'REMOVAL', millimetres: '600' })).toMatch(/600 mm/);
  });

  it('says who was first when two command the same batch', () => {
    expect(conflictSentence('CT-014', 'Olu')).toMatch(/^Olu changed CT-014 a moment before you\./);
    expect(conflictSentence('CT-014', null)).toMatch(/^Someone changed CT-014/);
  });
});
