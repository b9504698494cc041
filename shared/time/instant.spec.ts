import { describe, expect, it } from 'vitest';
import { DAY_MS, formatInstant, HOUR_MS, MINUTE_MS, parseInstant } from './instant';

describe('instants', () => {
  it('are read with Z, with an offset, and to the minute, second or millisecond', () => {
    const at = Date.UTC(2026, 11, 1, 9, 30);
    for (const text of [
      '2026-12-01T09:30Z',
      '2026-12-01T09:30:00Z',
      '2026-12-01T09:30:00.000Z',
      '2026-12-01T10:30:00+01:00',
      '2026-12-01T10:30:00+0100',
      '2026-12-01T00:00:00.0-09:30',
    ]) {
      expect(parseInstant(text), text).toBe(at);
    }
    expect(parseInstant('2026-12-01T09:30:00.123456789Z')).toBe(at + 123);
  });

  it.each([
    '',
    '2026-12-01',
    '2026-12-01Z',
    '2026-12-01T09:30:00',
    '1 Dec 2026 10:00Z',
    '2026-02-30T00:00:00Z',
    '2025-02-29T00:00:00+01:00',
    '2026-13-01T00:00:00Z',
    '2026-12-01T24:00:00Z',
    '2026-12-01T09:60:00Z',
    '2026-12-01T09:30:00+99:00',
    ' 2026-12-01T09:30:00Z',
  ])('are not read from "%s"', (text) => {
    expect(() => parseInstant(text)).toThrow(RangeError);
  });

  it('are written in UTC and read back', () => {
    const at = 1_796_117_400_123;
    expect(formatInstant(at)).toBe('2026-12-01T09:30:00.123Z');
    expect(parseInstant(formatInstant(at))).toBe(at);
    expect(formatInstant(-1)).toBe('1969-12-31T23:59:59.999Z');
    expect(() => formatInstant(Number.NaN)).toThrow(RangeError);
  });

  it('count in milliseconds', () => {
    expect([MINUTE_MS, HOUR_MS, DAY_MS]).toEqual([60_000, 3_600_000, 86_400_000]);
  });
});
