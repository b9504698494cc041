import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatAmount, formatLength, INCH, MILLIMETRE, parseLength } from './length';
import type { LengthUnit } from './length';

function read(text: string, assumed: LengthUnit = 'MILLIMETRE'): bigint | string {
  const parsed = parseLength(text, assumed);
  return parsed.ok ? parsed.length : parsed.problem;
}

describe('parseLength', () => {
  it.each([
    ['600', 600n * MILLIMETRE],
    ['600 mm', 600n * MILLIMETRE],
    [' 600MM ', 600n * MILLIMETRE],
    ['23.5 mm', 23_500_000n],
    ['23,5 mm', 23_500_000n],
    ['60 cm', 600n * MILLIMETRE],
    ['1.2 m', 1_200n * MILLIMETRE],
    ['0.000001 mm', 1n],
    ['3 5/16"', 84_137_500n],
    ['3-5/16 in', 84_137_500n],
    ['3–5/16 in', 84_137_500n],
    ['3.3125 in', 84_137_500n],
    ['3½"', 88_900_000n],
    ['3 ½ inches', 88_900_000n],
    ['½″', 12_700_000n],
    ['1/64 in', 396_875n],
    ["24''", 24n * INCH],
    ['23 5⁄8”', 600_075_000n],
  ])('reads %s', (text, length) => {
    expect(read(text)).toBe(length);
  });

  it('takes a bare number in the unit of the shop', () => {
    expect(read('12', 'INCH')).toBe(12n * INCH);
    expect(read('½', 'INCH')).toBe(INCH / 2n);
    expect(read('12', 'MILLIMETRE')).toBe(12n * MILLIMETRE);
  });

  it('remembers the unit that was typed', () => {
    expect(parseLength('3 in', 'MILLIMETRE')).toMatchObject({ unit: 'INCH' });
    expect(parseLength('60 cm', 'INCH')).toMatchObject({ unit: 'MILLIMETRE' });
  });

  it.each([
    ['', 'EMPTY'],
    ['   ', 'EMPTY'],
    ['long', 'NOT_A_LENGTH'],
    ['-5 mm', 'NOT_A_LENGTH'],
    ['1 2 mm', 'NOT_A_LENGTH'],
    ['3/0 in', 'NOT_A_LENGTH'],
    ['1.2.3', 'NOT_A_LENGTH'],
    ['9'.repeat(10_000), 'NOT_A_LENGTH'],
    ["2'", 'UNKNOWN_UNIT'],
    ['2 ells', 'UNKNOWN_UNIT'],
    ['2 constructor', 'UNKNOWN_UNIT'],
    ['1,000 mm', 'AMBIGUOUS_COMMA'],
    ['½ mm', 'FRACTION_NEEDS_INCHES'],
    ['1/2', 'FRACTION_NEEDS_INCHES'],
    ['1/3 in', 'NOT_A_RULE_FRACTION'],
    ['0.0000001 mm', 'TOO_FINE'],
    ['999999999999 mm', 'TOO_LONG'],
  ])('refuses %s', (text, problem) => {
    expect(read(text)).toBe(problem);
  });
});

describe('formatLength', () => {
  it.each([
    [600n * MILLIMETRE, '600 mm', '23 5/8 in'],
    [23_500_000n, '23.5 mm', '59/64 in'],
    [84_137_500n, '84.14 mm', '3 5/16 in'],
    [0n, '0 mm', '0 in'],
    [INCH, '25.4 mm', '1 in'],
    [INCH / 2n, '12.7 mm', '1/2 in'],
    [-12_700_000n, '-12.7 mm', '-1/2 in'],
  ])('writes %s', (length, millimetres, inches) => {
    expect(formatLength(length, 'MILLIMETRE')).toBe(millimetres);
    expect(formatLength(length, 'INCH')).toBe(inches);
  });

  it('writes amounts without the unit', () => {
    expect(formatAmount(400n * MILLIMETRE, 'MILLIMETRE')).toBe('400');
    expect(formatAmount(84_137_500n, 'INCH')).toBe('3 5/16');
  });

  it('reads back what it wrote: every 64th of an inch and every hundredth of a millimetre', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 20_000 }), (count) => {
        const inches = BigInt(count) * 396_875n;
        expect(read(formatLength(inches, 'INCH'))).toBe(inches);
        const millimetres = BigInt(count) * 10_000n;
        expect(read(formatLength(millimetres, 'MILLIMETRE'))).toBe(millimetres);
      }),
      { seed: 64, numRuns: 300 },
    );
  });
});
