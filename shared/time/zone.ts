import { DAY_MS, MINUTE_MS, type Instant } from './instant';

/** A local calendar date: 2026-12-01. */
export type LocalDate = string;

const QUARTER_MS = 15 * MINUTE_MS;

const formats = new Map<string, Intl.DateTimeFormat>();
const offsets = new Map<string, Map<number, number>>();

/** Whether a name is a zone of the IANA database. */
export function isZone(name: string): boolean {
  try {
    formatFor(name);
    return true;
  } catch {
    // Intl throws a RangeError for a name it does not know.
    return false;
  }
}

/** How far local time is ahead of UTC, in minutes (fractions for historic offsets with seconds). */
export function offsetMinutes(zone: string, at: Instant): number {
  const day = Math.floor(at / DAY_MS);
  const before = offsetAt(zone, day * DAY_MS);
  // No zone changes its offset and changes it back within a day, so equal ends mean an unchanged day.
  if (before === offsetAt(zone, (day + 1) * DAY_MS)) return before;
  // Offsets change on quarter hours at the finest.
  return offsetAt(zone, Math.floor(at / QUARTER_MS) * QUARTER_MS);
}

function offsetAt(zone: string, at: Instant): number {
  let known = offsets.get(zone);
  if (!known) {
    known = new Map();
    offsets.set(zone, known);
  }
  let offset = known.get(at);
  if (offset === undefined) {
    if (known.size > 50_000) known.clear();
    offset = readOffset(zone, at);
    known.set(at, offset);
  }
  return offset;
}

/** An instant on the wall of a zone: date, clock, weekday (1 Monday to 7 Sunday) and minute of the day by the clock. */
export function toLocal(
  zone: string,
  at: Instant,
): { date: LocalDate; time: string; weekday: number; minuteOfDay: number } {
  const local = new Date(at + offsetMinutes(zone, at) * MINUTE_MS);
  const iso = local.toISOString();
  return {
    date: iso.slice(0, 10),
    time: iso.slice(11, 16),
    weekday: local.getUTCDay() || 7,
    minuteOfDay: local.getUTCHours() * 60 + local.getUTCMinutes(),
  };
}

/**
 * The instant at which the clock of a zone shows a minute of a date (0 to 1440). A time that is skipped counts as the
 * same length after the skip began; of a time that comes twice it is the first.
 */
export function toInstant(zone: string, date: LocalDate, minuteOfDay: number): Instant {
  const wall = Date.parse(`${date}T00:00:00Z`) + minuteOfDay * MINUTE_MS;
  const before = offsetMinutes(zone, wall - DAY_MS);
  const after = offsetMinutes(zone, wall + DAY_MS);
  const early = wall - Math.max(before, after) * MINUTE_MS;
  const late = wall - Math.min(before, after) * MINUTE_MS;
  for (const at of [early, late]) {
    if (at + offsetMinutes(zone, at) * MINUTE_MS === wall) return at;
  }
  // Skipped: the offset from before the skip carries over it.
  return wall - before * MINUTE_MS;
}

/** The date n days later (earlier when negative). */
export function addDays(date: LocalDate, n: number): LocalDate {
  return new Date(Date.parse(`${date}T00:00:00Z`) + n * DAY_MS).toISOString().slice(0, 10);
}

/** Calendar days from a to b. */
export function daysBetween(a: LocalDate, b: LocalDate): number {
  return Math.round((Date.parse(`${b}T00:00:00Z`) - Date.parse(`${a}T00:00:00Z`)) / DAY_MS);
}

/** 1 Monday to 7 Sunday. */
export function weekdayOf(date: LocalDate): number {
  return new Date(`${date}T00:00:00Z`).getUTCDay() || 7;
}

/** Whether a text is a date that exists. */
export function isLocalDate(text: string): boolean {
  if (!/^\d{4}-\d\d-\d\d$/.test(text)) return false;
  const at = Date.parse(`${text}T00:00:00Z`);
  return !Number.isNaN(at) && new Date(at).toISOString().slice(0, 10) === text;
}

function readOffset(zone: string, at: Instant): number {
  const parts: Partial<Record<Intl.DateTimeFormatPartTypes, number>> = {};
  for (const part of formatFor(zone).formatToParts(at)) parts[part.type] = Number(part.value);
  const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = parts;
  const local = Date.UTC(year, month - 1, day, hour, minute, second);
  return (local - Math.floor(at / 1000) * 1000) / MINUTE_MS;
}

function formatFor(zone: string): Intl.DateTimeFormat {
  let format = formats.get(zone);
  if (!format) {
    format = new Intl.DateTimeFormat('en-US', {
      timeZone: zone,
      hourCycle: 'h23',
      year: 'numeric',
      month: 'numeric',
      day: 'numeric',
      hour: 'numeric',
      minute: 'numeric',
      second: 'numeric',
    });
    formats.set(zone, format);
  }
  return format;
}
