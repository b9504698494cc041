import { exceptionsByDate, spansOn, weeklySpans, type Hours, type Span } from './hours';
import { MINUTE_MS, type Instant } from './instant';
import { addDays, daysBetween, toLocal, weekdayOf, whenReached, type LocalDate } from './zone';

/**
 * Open intervals, half open, sorted, none touching another. `open` holds the open milliseconds before each interval and,
 * last, of all: one more than there are intervals. It makes every question below a binary search.
 */
export interface Calendar {
  readonly starts: readonly Instant[];
  readonly ends: readonly Instant[];
  readonly open: readonly number[];
}

interface Interval {
  start: Instant;
  end: Instant;
}

/** How far back the last open day before a date is looked for. */
const LOOK_BACK_DAYS = 60;

/** The open intervals of working hours between two instants, cut to them; none when `to` is not after `from`. */
export function buildCalendar(hours: Hours, from: Instant, to: Instant): Calendar {
  const exceptions = exceptionsByDate(hours);
  const intervals: Interval[] = [];
  const last = addDays(toLocal(hours.zone, to).date, 1);
  let date = addDays(toLocal(hours.zone, from).date, -1);
  for (; date <= last; date = addDays(date, 1)) {
    const spans = exceptions.get(date) ?? weeklySpans(hours, weekdayOf(date));
    for (const { start, end } of intervalsOf(hours.zone, date, spans)) {
      const cut = { start: Math.max(from, start), end: Math.min(to, end) };
      if (cut.start < cut.end) intervals.push(cut);
    }
  }
  return calendarOf(intervals.sort((a, b) => a.start - b.start));
}

/** When both are open. */
export function intersect(a: Calendar, b: Calendar): Calendar {
  const intervals: Interval[] = [];
  let i = 0;
  let j = 0;
  while (i < a.starts.length && j < b.starts.length) {
    const start = Math.max(at(a.starts, i), at(b.starts, j));
    const end = Math.min(at(a.ends, i), at(b.ends, j));
    if (start < end) intervals.push({ start, end });
    if (at(a.ends, i) < at(b.ends, j)) i += 1;
    else j += 1;
  }
  return calendarOf(intervals);
}

/** Whether an instant is open. An interval's start is, its end is not. */
export function isOpen(calendar: Calendar, instant: Instant): boolean {
  const i = firstEndingAfter(calendar, instant);
  return i < calendar.starts.length && at(calendar.starts, i) <= instant;
}

/** The first open instant at or after another; null when none is left. */
export function nextOpen(calendar: Calendar, instant: Instant): Instant | null {
  const i = firstEndingAfter(calendar, instant);
  return i < calendar.starts.length ? Math.max(instant, at(calendar.starts, i)) : null;
}

/** Open minutes between two instants, with fractions; 0 when b is not after a. Outside its bounds a calendar is closed. */
export function workingMinutesBetween(calendar: Calendar, a: Instant, b: Instant): number {
  return b > a ? (openBefore(calendar, b) - openBefore(calendar, a)) / MINUTE_MS : 0;
}

/**
 * When pausable work of so many minutes that begins at the first open instant from `start` on is done: work that fills an
 * interval is done at its end, not at the next start. Work of no minutes is done at that first open instant. Null when
 * the calendar ends first; RangeError for less than no minutes.
 */
export function addWorkingMinutes(
  calendar: Calendar,
  start: Instant,
  minutes: number,
): Instant | null {
  const length = lengthOf(minutes);
  const first = firstEndingAfter(calendar, start);
  if (first === calendar.starts.length) return null;
  const begun = at(calendar.open, first) + Math.max(0, start - at(calendar.starts, first));
  const done = begun + length;
  if (done > at(calendar.open, calendar.starts.length)) return null;
  // The first interval by whose end that much has been open.
  const last = Math.max(first, firstAtLeast(calendar.open, done) - 1);
  return at(calendar.starts, last) + done - at(calendar.open, last);
}

/**
 * The latest start from which pausable work of so many minutes is done by `end`: work that fills an interval begins at
 * its start. Work of no minutes starts at the last open time before `end`. Null when the calendar begins later.
 */
export function subtractWorkingMinutes(
  calendar: Calendar,
  end: Instant,
  minutes: number,
): Instant | null {
  const begun = openBefore(calendar, end) - lengthOf(minutes);
  const latest = firstAtLeast(calendar.starts, end) - 1;
  if (begun < 0 || latest < 0) return null;
  // The last interval before which no more than that has been open.
  const first = Math.min(latest, firstAbove(calendar.open, begun) - 1);
  return at(calendar.starts, first) + begun - at(calendar.open, first);
}

/** The earliest slot from `start` on of work that fits whole into one open interval; null when none is long enough. */
export function firstWholeSpan(
  calendar: Calendar,
  start: Instant,
  minutes: number,
): { start: Instant; end: Instant } | null {
  const length = lengthOf(minutes);
  for (let i = firstEndingAfter(calendar, start); i < calendar.starts.length; i++) {
    const from = Math.max(start, at(calendar.starts, i));
    if (from + length <= at(calendar.ends, i)) return { start: from, end: from + length };
  }
  return null;
}

/**
 * The instant of a due date: the end of that day's working hours, else of the last open day before within 60 days, else
 * the end of the date itself. A day whose hours clocks jump over is not open.
 */
export function endOfWorkOn(hours: Hours, date: LocalDate): Instant {
  for (let back = 0; back <= LOOK_BACK_DAYS; back++) {
    const day = addDays(date, -back);
    const intervals = intervalsOf(hours.zone, day, spansOn(hours, day));
    if (intervals.length > 0) return Math.max(...intervals.map(({ end }) => end));
  }
  return whenReached(hours.zone, date, 24 * 60);
}

/** Days with hours after a up to and with b; negative (b up to before a) when b is before a. */
export function workingDaysBetween(hours: Hours, a: LocalDate, b: LocalDate): number {
  if (b < a) return 0 - workingDaysBetween(hours, b, a);
  const isWorked = (weekday: number) => weeklySpans(hours, weekday).length > 0;
  const days = daysBetween(a, b);
  let worked = Math.floor(days / 7) * [1, 2, 3, 4, 5, 6, 7].filter(isWorked).length;
  for (let i = 0; i < days % 7; i++) if (isWorked(((weekdayOf(a) + i) % 7) + 1)) worked += 1;
  for (const [date, spans] of exceptionsByDate(hours)) {
    if (date <= a || date > b) continue;
    worked += Number(spans.length > 0) - Number(isWorked(weekdayOf(date)));
  }
  return worked;
}

/** The spans of a date as intervals; those that clocks jump over are none. */
function intervalsOf(zone: string, date: LocalDate, spans: readonly Span[]): Interval[] {
  return spans
    .map(({ from, to }) => ({
      start: whenReached(zone, date, from),
      end: whenReached(zone, date, to),
    }))
    .filter(({ start, end }) => start < end);
}

/** From intervals sorted by their start. Those that touch, as across midnight, become one. */
function calendarOf(intervals: readonly Interval[]): Calendar {
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
  const open = [0];
  starts.forEach((start, i) => open.push(at(open, i) + at(ends, i) - start));
  return { starts, ends, open };
}

/** Open milliseconds before an instant. */
function openBefore(calendar: Calendar, instant: Instant): number {
  const i = firstEndingAfter(calendar, instant);
  const inside = i < calendar.starts.length ? Math.max(0, instant - at(calendar.starts, i)) : 0;
  return at(calendar.open, i) + inside;
}

/** Minutes of work in whole milliseconds, so that instants stay whole. */
function lengthOf(minutes: number): number {
  if (!(minutes >= 0)) throw new RangeError(`Not a length of work: ${minutes} min`);
  return Math.round(minutes * MINUTE_MS);
}

/** The index of the first interval that ends after an instant. */
function firstEndingAfter({ ends }: Calendar, instant: Instant): number {
  return firstAbove(ends, instant);
}

/** The index of the first of sorted values that is at least a value; their count when none is. */
function firstAtLeast(values: readonly number[], value: number): number {
  let low = 0;
  let high = values.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (at(values, middle) < value) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** The index of the first of sorted values that is above a value; their count when none is. */
function firstAbove(values: readonly number[], value: number): number {
  let low = 0;
  let high = values.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (at(values, middle) <= value) low = middle + 1;
    else high = middle;
  }
  return low;
}

function at(values: readonly number[], index: number): number {
  return values[index] ?? Number.NaN;
}
