import { describe, expect, it } from 'vitest';
import { clampsSchema, MOST_CLASSES } from './clamps-schema';

const SIX_HUNDRED = { key: 'c600', length: '600000000', count: 12 };

function issues(input: unknown): string[] {
  const parsed = clampsSchema.safeParse(input);
  return parsed.success ? [] : parsed.error.issues.map((issue) => issue.path.join('.'));
}

describe('clampsSchema', () => {
  it('takes classes as they are and turns lengths into whole nanometres', () => {
    expect(clampsSchema.parse([SIX_HUNDRED, { length: '900000000', count: 0 }])).toEqual([
      { key: 'c600', length: 600_000_000n, count: 12 },
      { key: null, length: 900_000_000n, count: 0 },
    ]);
  });

  it('takes the shortest and the longest clamp, and no shorter or longer one', () => {
    const length = (digits: string) => issues([{ key: null, length: digits, count: 1 }]);
    expect(length('50000000')).toEqual([]);
    expect(length('3000000000')).toEqual([]);
    expect(length('49999999')).toEqual(['0.length']);
    expect(length('3000000001')).toEqual(['0.length']);
  });

  it.each(['', '6e8', '-600000000', '600.5', '9'.repeat(10_000)])(
    'refuses %s as a length',
    (digits) => {
      expect(issues([{ ...SIX_HUNDRED, length: digits }])).toEqual(['0.length']);
    },
  );

  it.each([-1, 501, 1.5, Number.NaN, Infinity, '3', null])('refuses %s as a count', (count) => {
    expect(issues([{ ...SIX_HUNDRED, count }])).toEqual(['0.count']);
  });

  it('refuses the same length twice, at the second', () => {
    expect(issues([SIX_HUNDRED, { key: null, length: '600000000', count: 2 }])).toEqual([
      '1.length',
    ]);
  });

  it('refuses the same class twice', () => {
    expect(issues([SIX_HUNDRED, { ...SIX_HUNDRED, length: '700000000' }])).toEqual(['1.key']);
  });

  it('refuses none, and more than there can be', () => {
    const many = Array.from({ length: MOST_CLASSES + 1 }, (_, index) => ({
      key: null,
      length: String(600_000_000 + index),
      count: 1,
    }));
    expect(issues([])).toEqual(['']);
    expect(issues(many)).toEqual(['']);
    expect(issues(many.slice(1))).toEqual([]);
  });
});
