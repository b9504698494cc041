import { spansOn, type Hours } from './hours';
import { MINUTE_MS, type Instant } from './instant';
import { addDays, toInstant, toLocal, type LocalDate } from './zone';

/** Open intervals in UTC, half open, sorted, none touching another. */
export interface Calendar {
  readonly starts: readonly Instant[];
  readonly ends: readonly Instant[];
}

/** How far back the last open day before a date is looked for. */
const LOOK_BACK_DAYS = 60;

/** The open intervals of working hours between two instants, cut to them. */
export function buildCalendar(hours: Hours, from: Instant, to: Instant): Calendar {
  const intervals: { start: Instant; end: Instant }[] = [];
  const last = addDays(toLocal(hours.zone, to).date, 1);
  for (
    let date = addDays(toLocal(hours.zone, from).date, -1);
    date <= last;
    date = addDays(date, 1)
  ) {
    for (const span of spansOn(hours, date)) {
      const start = Math.max(from, toInstant(hours.zone, date, span.from));
      const end = Math.min(to, toInstant(hours.zone, date, span.to));
      if (start < end) intervals.push({ start, end });
    }
  }
  return normalise(intervals);
}

/** When both are open. */
export function intersect(a: Calendar, b: Calendar): Calendar {
  const starts: Instant[] = [];
  const ends: Instant[] = [];
  let i = 0;
  let j = 0;
  while (i < a.starts.length && j < b.starts.length) {
    const start = Math.max(at(a.starts, i), at(b.starts, j));
    const end = Math.min(at(a.ends, i), at(b.ends, j));
    if (start < end) {
      starts.push(start);
      ends.push(end);
    }
    if (at(a.ends, i) < at(b.ends, j)) i += 1;
    else j += 1;
  }
  return { starts, ends };
}

/** Whether an instant is open. */
export function isOpen(calendar: Calendar, instant: Instant): boolean {
  const i = firstEndingAfter(calendar, instant);
  return i < calendar.starts.length && at(calendar.starts, i) <= instant;
}

/** The first open instant at or after another; null when none is left. */
export function nextOpen(calendar: Calendar, instant: Instant): Instant | null {
  const i = firstEndingAfter(calendar, instant);
  return i < calendar.starts.length ? Math.max(instant, at(calendar.starts, i)) : null;
}

/** Open minutes between two instants; 0 when b is not after a. */
export function workingMinutesBetween(calendar: Calendar, a: Instant, b: Instant): number {
  let sum = 0;
  for (let i = firstEndingAfter(calendar, a); i < calendar.starts.length; i++) {
    const start = Math.max(a, at(calendar.starts, i));
    const end = Math.min(b, at(calendar.ends, i));
    if (start >= b) break;
    sum += end - start;
  }
  return sum / MINUTE_MS;
}

/**
 * When pausable work of so many minutes that begins at the first open instant from `start` on is done. Work of no
 * minutes is done at that first open instant. Null when the calendar ends first.
 */
export function addWorkingMinutes(
  calendar: Calendar,
  start: Instant,
  minutes: number,
): Instant | null {
  let left = minutes * MINUTE_MS;
  for (let i = firstEndingAfter(calendar, start); i < calendar.starts.length; i++) {
    const from = Math.max(start, at(calendar.starts, i));
    const room = at(calendar.ends, i) - from;
    if (left <= room) return from + left;
    left -= room;
  }
  return null;
}

/** The latest start from which pausable work of so many minutes is done by `end`; null when the calendar begins later. */
export function subtractWorkingMinutes(
  calendar: Calendar,
  end: Instant,
  minutes: number,
): Instant | null {
  let left = minutes * MINUTE_MS;
  for (let i = calendar.starts.length - 1; i >= 0; i--) {
    const to = Math.min(end, at(calendar.ends, i));
    const room = to - at(calendar.starts, i);
    if (room <= 0) continue;
    if (left <= room) return to - left;
    left -= room;
  }
  return null;
}

/** The earliest start from `start` on of work that fits whole into one open interval; null when none is long enough. */
export function firstWholeSpan(
  calendar: Calendar,
  start: Instant,
  minutes: number,
): { start: Instant; end: Instant } | null {
  const length = minutes * MINUTE_MS;
  for (let i = firstEndingAfter(calendar, start); i < calendar.starts.length; i++) {
    const from = Math.max(start, at(calendar.starts, i));
    if (from + length <= at(calendar.ends, i)) return { start: from, end: from + length };
  }
  return null;
}

/**
 * The instant of a due date: the end of that day's working hours, else of the last open day before within 60 days, else
 * the end of the date itself.
 */
export function endOfWorkOn(hours: Hours, date: LocalDate): Instant {
  for (let back = 0; back <= LOOK_BACK_DAYS; back++) {
    const day = addDays(date, -back);
    const spans = spansOn(hours, day);
    if (spans.length > 0)
      return toInstant(hours.zone, day, Math.max(...spans.map((span) => span.to)));
  }
  return toInstant(hours.zone, date, 24 * 60);
}

/** Open days after a up to and with b; negative when b is before a. */
export function workingDaysBetween(hours: Hours, a: LocalDate, b: LocalDate): number {
  if (b < a) return -workingDaysBetween(hours, b, a);
  let days = 0;
  for (let date = addDays(a, 1); date <= b; date = addDays(date, 1)) {
    if (spansOn(hours, date).length > 0) days += 1;
  }
  return days;
}

/** Spans of one day may touch across midnight or, where clocks go back, overlap: they become one interval. */
function normalise(intervals: { start: Instant; end: Instant }[]): Calendar {
  intervals.sort((a, b) => a.start - b.start);
  const starts: Instant[] = [];
  const ends: Instant[] = [];
  for (const { start, end } of intervals) {
    const last = ends.length - 1;
    if (last >= 0 && start <= at(ends, last)) ends[last] = Math.max(at(ends, last), end);
    else {
      starts.push(start);
      ends.push(end);
    }
  }
  return { starts, ends };
}

/** The index of the first interval that ends after an instant. */
function firstEndingAfter({ ends }: Calendar, instant: Instant): number {
  let low = 0;
  let high = ends.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (at(ends, middle) <= instant) low = middle + 1;
    else high = middle;
  }
  return low;
}

function at(values: readonly number[], index: number): number {
  return values[index] ?? Number.NaN;
}
