import { DAY_MS, MINUTE_MS, type Instant } from './instant';
import { changeBetween, clockFormat, offsetMs } from './offset';

/** A local calendar date: 2026-12-01. Arithmetic is for the years 1000 to 9999. */
export type LocalDate = string;

/** A time on the wall, to the minute: 07:30. */
export type LocalTime = string;

/** Whether a name is a zone of the IANA database. A bare offset (+01:00) is none: it has no seasons. */
export function isZone(name: string): boolean {
  if (!/^[A-Za-z]/.test(name)) return false;
  try {
    // Not remembered: names come from strangers, and each formatter weighs kilobytes.
    clockFormat(name);
    return true;
  } catch {
    // Intl throws a RangeError for a name it does not know.
    return false;
  }
}

/** How far local time is ahead of UTC, in minutes (a fraction where a historic offset has seconds). */
export function offsetMinutes(zone: string, at: Instant): number {
  return offsetMs(zone, at) / MINUTE_MS;
}

/** An instant on the wall of a zone: date, clock, weekday (1 Monday to 7 Sunday) and minute of the day by the clock. */
export function toLocal(
  zone: string,
  at: Instant,
): { date: LocalDate; time: LocalTime; weekday: number; minuteOfDay: number } {
  const local = new Date(at + offsetMs(zone, at));
  const iso = local.toISOString();
  return {
    date: iso.slice(0, 10),
    time: iso.slice(11, 16),
    weekday: local.getUTCDay() || 7,
    minuteOfDay: local.getUTCHours() * 60 + local.getUTCMinutes(),
  };
}

/**
 * The instant at which the clock of a zone shows a minute of a date (0 to 1440). A time that is skipped moves forward by
 * the length of the skip (02:30 becomes 03:30); of a time that comes twice it is the first. RangeError for no date.
 */
export function toInstant(zone: string, date: LocalDate, minuteOfDay: number): Instant {
  const wall = midnightUtc(date) + minuteOfDay * MINUTE_MS;
  return instantOf(zone, wall) ?? wall - offsetMs(zone, wall - DAY_MS);
}

/**
 * The first instant at which the clock of a zone shows a minute of a date or, where that is skipped, anything later: the
 * moment of the skip. Unlike `toInstant` it never turns two times of a day around, so it bounds spans of time.
 */
export function whenReached(zone: string, date: LocalDate, minuteOfDay: number): Instant {
  const wall = midnightUtc(date) + minuteOfDay * MINUTE_MS;
  const shown = instantOf(zone, wall);
  if (shown !== null) return shown;
  const [before, after] = [offsetMs(zone, wall - DAY_MS), offsetMs(zone, wall + DAY_MS)];
  return changeBetween(zone, wall - after, wall - before);
}

/** The date n days later (earlier when negative). RangeError when that is past the year 9999. */
export function addDays(date: LocalDate, n: number): LocalDate {
  const iso = new Date(midnightUtc(date) + n * DAY_MS).toISOString();
  if (iso.length > 24) throw new RangeError(`No date: ${date} and ${n} days`);
  return iso.slice(0, 10);
}

/** Calendar days from a to b; negative when b is before a. */
export function daysBetween(a: LocalDate, b: LocalDate): number {
  return Math.round((midnightUtc(b) - midnightUtc(a)) / DAY_MS);
}

/** 1 Monday to 7 Sunday. */
export function weekdayOf(date: LocalDate): number {
  return new Date(midnightUtc(date)).getUTCDay() || 7;
}

/** Whether a text is a date that exists, in the years 1000 to 9999. */
export function isLocalDate(text: string): boolean {
  if (!/^[1-9]\d{3}-\d\d-\d\d$/.test(text)) return false;
  const at = midnightUtc(text);
  return !Number.isNaN(at) && new Date(at).toISOString().slice(0, 10) === text;
}

/** The first instant at which a zone's clock shows a wall time (as if it were UTC); null when it is skipped. */
function instantOf(zone: string, wall: number): Instant | null {
  // Local time is within a day of UTC, so these two offsets stand before and after any change near this time.
  const before = offsetMs(zone, wall - DAY_MS);
  const after = offsetMs(zone, wall + DAY_MS);
  const early = wall - Math.max(before, after);
  if (early + offsetMs(zone, early) === wall) return early;
  const late = wall - Math.min(before, after);
  return late + offsetMs(zone, late) === wall ? late : null;
}

function midnightUtc(date: LocalDate): number {
  return Date.parse(`${date}T00:00:00Z`);
}
