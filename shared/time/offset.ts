import { DAY_MS, type Instant } from './instant';

/** What is known of one zone: its offset at UTC midnights, and the instant of the change on days that have one. */
interface Known {
  readonly format: Intl.DateTimeFormat;
  readonly atMidnight: Map<number, number>;
  readonly changes: Map<number, Instant>;
}

/** Days remembered a zone, about a century: more is asked for only by a caller that went astray. */
const MOST_DAYS = 40_000;

const zones = new Map<string, Known>();

/**
 * How far local time is ahead of UTC at an instant, in milliseconds (whole seconds). RangeError for a zone that Intl does
 * not know and for an instant that is no date. Remembered by the day, because Intl takes microseconds and planning asks
 * many thousand times.
 */
export function offsetMs(zone: string, at: Instant): number {
  const known = knownOf(zone);
  const day = Math.floor(at / DAY_MS);
  const before = offsetAtMidnight(known, day);
  const after = offsetAtMidnight(known, day + 1);
  // Since 1970 no zone has changed twice within four days, so equal ends are an unchanged day.
  if (before === after) return before;
  let change = known.changes.get(day);
  if (change === undefined) {
    change = bisect(day * DAY_MS, (day + 1) * DAY_MS, (t) => readOffset(known.format, t) === after);
    known.changes.set(day, change);
  }
  return at < change ? before : after;
}

/** The instant of the one change of offset after `from` and up to `to`; the offsets of the two must differ. */
export function changeBetween(zone: string, from: Instant, to: Instant): Instant {
  const after = offsetMs(zone, to);
  return bisect(from, to, (t) => offsetMs(zone, t) === after);
}

/** A formatter of a zone's clock; RangeError for a name that Intl does not know. */
export function clockFormat(zone: string): Intl.DateTimeFormat {
  return new Intl.DateTimeFormat('en-US', {
    timeZone: zone,
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
  });
}

function knownOf(zone: string): Known {
  let known = zones.get(zone);
  if (!known) {
    known = { format: clockFormat(zone), atMidnight: new Map(), changes: new Map() };
    zones.set(zone, known);
  }
  return known;
}

function offsetAtMidnight(known: Known, day: number): number {
  let offset = known.atMidnight.get(day);
  if (offset === undefined) {
    if (known.atMidnight.size >= MOST_DAYS) {
      known.atMidnight.clear();
      known.changes.clear();
    }
    offset = readOffset(known.format, day * DAY_MS);
    known.atMidnight.set(day, offset);
  }
  return offset;
}

function readOffset(format: Intl.DateTimeFormat, at: Instant): number {
  const parts: Partial<Record<Intl.DateTimeFormatPartTypes, number>> = {};
  for (const part of format.formatToParts(at)) parts[part.type] = Number(part.value);
  const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = parts;
  return Date.UTC(year, month - 1, day, hour, minute, second) - Math.floor(at / 1000) * 1000;
}

/** The first millisecond in (from, to] of which something holds that holds from then on to the end. */
function bisect(from: Instant, to: Instant, holds: (at: Instant) => boolean): Instant {
  let low = from;
  let high = to;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (holds(middle)) high = middle;
    else low = middle;
  }
  return high;
}
