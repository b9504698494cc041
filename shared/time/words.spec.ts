import { describe, expect, it } from 'vitest';
import { parseInstant } from './instant';
import { agoWords, clockWords, dateWords, durationWords } from './words';

describe('a time in words', () => {
  const now = parseInstant('2026-12-01T13:00:00Z'); // Tuesday, 14:00 in Berlin
  it.each([
    ['2026-12-01T13:20:00Z', '14:20'],
    ['2026-11-30T23:00:00Z', '00:00'],
    ['2026-12-01T22:59:59Z', '23:59'],
    ['2026-12-01T23:00:00Z', 'Wed 00:00'],
    ['2026-11-30T22:59:00Z', 'Mon 23:59'],
    ['2026-12-02T08:05:00Z', 'Wed 09:05'],
    ['2026-12-07T08:05:00Z', 'Mon 09:05'],
    ['2026-12-08T08:05:00Z', 'Tue 8 Dec 09:05'],
    ['2026-12-09T08:05:00Z', 'Wed 9 Dec 09:05'],
    ['2026-11-25T08:05:00Z', 'Wed 09:05'],
    ['2026-11-24T08:05:00Z', 'Tue 24 Nov 09:05'],
  ])('%s is "%s"', (at, words) => {
    expect(clockWords('Europe/Berlin', now, parseInstant(at))).toBe(words);
  });

  it('is on the wall of the zone, with its summer time', () => {
    const at = parseInstant('2026-07-01T13:20:00Z');
    expect(clockWords('Europe/Berlin', at, at)).toBe('15:20');
    expect(clockWords('Asia/Kathmandu', at, at)).toBe('19:05');
  });
});

describe('a date in words', () => {
  it.each([
    ['2026-12-01', 'Tue 1 Dec'],
    ['2027-01-31', 'Sun 31 Jan'],
    ['2028-02-29', 'Tue 29 Feb'],
  ])('%s is "%s"', (date, words) => {
    expect(dateWords(date)).toBe(words);
  });
});

describe('a duration in words', () => {
  it.each([
    [-5, '0 min'],
    [0, '0 min'],
    [0.4, '0 min'],
    [0.5, '1 min'],
    [45, '45 min'],
    [59.4, '59 min'],
    [59.5, '1 h'],
    [80, '1 h 20 min'],
    [720, '12 h'],
    [1439, '23 h 59 min'],
    [1439.5, '1 d'],
    [1440, '1 d'],
    [1470, '1 d 1 h'],
    [3060, '2 d 3 h'],
    [2879, '2 d'],
  ])('%s minutes are "%s"', (minutes, words) => {
    expect(durationWords(minutes)).toBe(words);
  });
});

describe('an age in words', () => {
  it.each([
    [-1, '0 s'],
    [1_000, '1 s'],
    [59_499, '59 s'],
    [59_500, '1 min'],
    [180_000, '3 min'],
    [7_200_000, '2 h'],
  ])('%s ms are "%s"', (milliseconds, words) => {
    expect(agoWords(milliseconds)).toBe(words);
  });
});
