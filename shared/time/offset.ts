import { DAY_MS, type Instant } from './instant';

/**
 * No zone changes twice within four days, so a block of them whose ends agree has no change. Counted, day by day, over the
 * 418 zones of Node 20's ICU data from 1970 to 2040.
 */
const BLOCK_MS = 4 * DAY_MS;

/** What is known of one zone: its offset at the bounds of blocks, and the instant of the change in those that have one. */
interface Known {
  readonly format: Intl.DateTimeFormat;
  readonly atBound: Map<number, number>;
  readonly changes: Map<number, Instant>;
}

/** Blocks remembered a zone, about a century: more is asked for only by a caller that went astray. */
const MOST_BLOCKS = 10_000;

const zones = new Map<string, Known>();

/**
 * How far local time is ahead of UTC at an instant, in milliseconds (whole seconds). RangeError for a zone that Intl does
 * not know and for an instant that is no date. Remembered by the block, because Intl takes microseconds and planning asks
 * many thousand times.
 */
export function offsetMs(zone: string, at: Instant): number {
  const known = knownOf(zone);
  const block = Math.floor(at / BLOCK_MS);
  const before = offsetAtBound(known, block);
  const after = offsetAtBound(known, block + 1);
  if (before === after) return before;
  let change = known.changes.get(block);
  if (change === undefined) {
    change = bisect(
      block * BLOCK_MS,
      (block + 1) * BLOCK_MS,
      (t) => readOffset(known.format, t) === after,
    );
    known.changes.set(block, change);
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
    known = { format: clockFormat(zone), atBound: new Map(), changes: new Map() };
    zones.set(zone, known);
  }
  return known;
}

function offsetAtBound(known: Known, block: number): number {
  let offset = known.atBound.get(block);
  if (offset === undefined) {
    if (known.atBound.size >= MOST_BLOCKS) {
      known.atBound.clear();
      known.changes.clear();
    }
    offset = readOffset(known.format, block * BLOCK_MS);
    known.atBound.set(block, offset);
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
