import fc from 'fast-check';
import { DateTime } from 'luxon';
import { describe, expect, it } from 'vitest';
import {
  addWorkingMinutes,
  buildCalendar,
  endOfWorkOn,
  firstWholeSpan,
  intersect,
  isOpen,
  nextOpen,
  subtractWorkingMinutes,
  workingDaysBetween,
  workingMinutesBetween,
} from '#shared/time/calendar';
import type { Hours, Span } from '#shared/time/hours';
import { DAY_MS, MINUTE_MS } from '#shared/time/instant';
import { addDays } from '#shared/time/zone';
import { CHANGES, PATIENCE, runs, SEED, STEADY } from './clock-changes';
import { edges, walk } from './luxon-calendar';

const spans = (first: number, last: number): fc.Arbitrary<Span[]> =>
  fc
    .uniqueArray(fc.integer({ min: first, max: last }), { maxLength: 8 })
    .map((minutes) => minutes.sort((a, b) => a - b))
    .map((sorted) =>
      sorted.flatMap((from, i) => {
        const to = sorted[i + 1];
        return i % 2 === 0 && to !== undefined ? [{ from, to }] : [];
      }),
    );

/** Spans of all the day, with some more that have their edges where clocks change, or touch midnight. */
const nightSpans: fc.Arbitrary<Span[]> = fc.oneof(
  { weight: 3, arbitrary: spans(0, 1440) },
  { weight: 2, arbitrary: spans(0, 250) },
  { weight: 1, arbitrary: fc.constant<Span[]>([{ from: 0, to: 1440 }]) },
  { weight: 1, arbitrary: spans(1300, 1440) },
);

const exceptions = (date: string, days: number, of: fc.Arbitrary<Span[]>) =>
  fc
    .uniqueArray(fc.integer({ min: -days, max: days }), { maxLength: 4 })
    .chain((offsets) =>
      fc.tuple(
        ...offsets.map((offset) =>
          of.map((some) => ({ date: addDays(date, offset), spans: some })),
        ),
      ),
    );

const weekly = (of: fc.Arbitrary<Span[]>) => fc.array(of, { minLength: 7, maxLength: 7 });

const DAYS = 4;
const WINDOW = DAYS * 1440;

/** Four days around a change (or around none) with the hours of two people, and questions in it. */
const nights = fc.constantFrom(...CHANGES, ...STEADY).chain(([zone, date]) =>
  fc.record({
    zone: fc.constant(zone),
    from: fc
      .integer({ min: -1440, max: 1440 })
      .map((shift) => Date.parse(`${date}T00:00:00Z`) - 2 * DAY_MS + shift * MINUTE_MS),
    weekly: weekly(nightSpans),
    exceptions: exceptions(date, 2, nightSpans),
    other: weekly(nightSpans),
    questions: fc.array(
      fc.record({
        a: fc.integer({ min: 0, max: WINDOW }),
        b: fc.integer({ min: 0, max: WINDOW }),
        minutes: fc.oneof(
          fc.integer({ min: 0, max: 200 }),
          fc.integer({ min: 0, max: 1500 }),
          fc.constantFrom(0, 1, 60, 120),
        ),
      }),
      { minLength: 8, maxLength: 8 },
    ),
  }),
);

describe(
  `working time against luxon, minute by minute (seed ${SEED})`,
  { timeout: PATIENCE },
  () => {
    it('is the same around every kind of change of clocks', () => {
      let [answered, refused] = [0, 0];
      fc.assert(
        fc.property(nights, ({ zone, from, questions, other, ...mine }) => {
          const hours: Hours = { zone, ...mine };
          const to = from + WINDOW * MINUTE_MS;
          const theirs: Hours = { zone, weekly: other, exceptions: [] };
          const alone = buildCalendar(hours, from, to);
          const calendars = [alone, intersect(alone, buildCalendar(theirs, from, to))];
          const aloneWalked = walk(hours, from, WINDOW);
          const theirsWalked = walk(theirs, from, WINDOW);
          const walks = [
            aloneWalked.map((minute) => minute.open),
            aloneWalked.map((minute, i) => minute.open && theirsWalked[i]?.open === true),
          ];
          const instant = (i: number) => (i < 0 || i > WINDOW ? null : from + i * MINUTE_MS);

          for (const [which, calendar] of calendars.entries()) {
            const open = walks[which] ?? [];
            expect(calendar.starts).toEqual(
              open.flatMap((is, i) => (is && !open[i - 1] ? [instant(i)] : [])),
            );
            expect(calendar.ends).toEqual(
              open.flatMap((is, i) => (is && !open[i + 1] ? [instant(i + 1)] : [])),
            );
            for (const { a, b, minutes } of questions) {
              const at = from + a * MINUTE_MS;
              const done = addWorkingMinutes(calendar, at, minutes);
              const whole = wholeFrom(open, a, minutes);
              // One comparison of all answers: thousands of single ones take longer than the walk.
              expect({
                isOpen: isOpen(calendar, at),
                next: nextOpen(calendar, at),
                between: workingMinutesBetween(calendar, at, from + b * MINUTE_MS),
                done,
                begun: subtractWorkingMinutes(calendar, at, minutes),
                whole: firstWholeSpan(calendar, at, minutes),
              }).toEqual({
                isOpen: open[a] === true,
                next: instant(open.indexOf(true, a)),
                between: open.slice(a, Math.max(a, b)).filter(Boolean).length,
                done: instant(walkOn(open, a, minutes)),
                begun: instant(walkBack(open, a, minutes)),
                whole: whole < 0 ? null : { start: instant(whole), end: instant(whole + minutes) },
              });
              if (done === null) refused += 1;
              else answered += 1;
            }
          }
        }),
        runs(300),
      );
      // Both kinds of answers were asked for often enough to mean something.
      expect(answered).toBeGreaterThan(500);
      expect(refused).toBeGreaterThan(100);
    });

    it('ends on a due date where the walk was last open on it or before', () => {
      let found = 0;
      fc.assert(
        fc.property(nights, ({ zone, from, weekly: week, exceptions: dated }) => {
          const hours: Hours = { zone, weekly: week, exceptions: dated };
          const walked = walk(hours, from, WINDOW + 1440);
          const due = walked[WINDOW - 1440]?.date ?? '';
          const last = walked.findLast((minute) => minute.open && minute.date <= due);
          if (!last || last.at === from) return;
          found += 1;
          expect(endOfWorkOn(hours, due)).toBe(last.at + MINUTE_MS);
        }),
        runs(200),
      );
      expect(found).toBeGreaterThan(40);
    });
  },
);

describe(`working time against luxon, over 400 days (seed ${SEED})`, { timeout: PATIENCE }, () => {
  const zones = [...new Set([...CHANGES, ...STEADY].map(([zone]) => zone))];
  const years = fc.record({
    zone: fc.constantFrom(...zones.filter((zone) => zone !== 'Pacific/Kwajalein')),
    first: fc.integer({ min: 0, max: 3000 }).map((days) => addDays('2022-06-01', days)),
    // By day, when clocks do not change.
    weekly: weekly(spans(300, 1300)),
    dated: fc.array(
      fc.tuple(fc.integer({ min: 0, max: 399 }), fc.oneof(fc.constant([]), spans(300, 1300))),
      {
        maxLength: 60,
      },
    ),
    questions: fc.array(
      fc.record({
        a: fc.integer({ min: 0, max: 400 * 1440 }),
        length: fc.oneof(
          fc.integer({ min: 0, max: 3000 }),
          fc.integer({ min: 0, max: 400 * 1440 }),
        ),
      }),
      { minLength: 20, maxLength: 20 },
    ),
  });

  it('is the same interval by interval', () => {
    fc.assert(
      fc.property(years, ({ zone, first, weekly: week, dated, questions }) => {
        const byDate = new Map(dated.map(([day, some]) => [addDays(first, day), some]));
        const exceptions = [...byDate].map(([date, some]) => ({ date, spans: some }));
        const hours: Hours = { zone, weekly: week, exceptions };
        const from = DateTime.fromISO(first, { zone }).toMillis();
        const to = DateTime.fromISO(first, { zone }).plus({ days: 400 }).toMillis();
        const calendar = buildCalendar(hours, from, to);
        const intervals = edges(hours, first, 400);
        expect(calendar.starts).toEqual(intervals.map(([start]) => start));
        expect(calendar.ends).toEqual(intervals.map(([, end]) => end));

        for (const { a, length } of questions) {
          const at = from + a * MINUTE_MS;
          const until = at + length * MINUTE_MS;
          const between = intervals.reduce(
            (sum, [start, end]) => sum + Math.max(0, Math.min(end, until) - Math.max(start, at)),
            0,
          );
          expect(workingMinutesBetween(calendar, at, until)).toBe(between / MINUTE_MS);

          let left = length * MINUTE_MS;
          let done: number | null = null;
          for (const [start, end] of intervals) {
            const begin = Math.max(start, at);
            if (begin >= end || done !== null) continue;
            if (begin + left <= end) done = begin + left;
            else left -= end - begin;
          }
          expect(addWorkingMinutes(calendar, at, length)).toBe(done);
          // Back and forth: work that begins as late as it may is done by then.
          const latest = subtractWorkingMinutes(calendar, until, length);
          if (latest !== null && length > 0) {
            const again = addWorkingMinutes(calendar, latest, length);
            expect(again).not.toBeNull();
            expect(again).toBeLessThanOrEqual(until);
            expect(workingMinutesBetween(calendar, latest + 1, until)).toBeLessThan(length);
          }
        }

        // From an exception where there is one, since the first date itself does not count.
        const begin = dated[0]?.[0] ?? 3;
        const a = addDays(first, begin);
        const b = addDays(a, (questions[0]?.a ?? 0) % (400 - begin));
        const days = new Set(
          intervals.map(([start]) => DateTime.fromMillis(start, { zone }).toISODate() ?? ''),
        );
        expect(workingDaysBetween(hours, a, b)).toBe(
          [...days].filter((date) => date > a && date <= b).length,
        );
      }),
      runs(60),
    );
  });
});

/** The index after the last of so many open minutes from a on; of none the first open one; -1 when they run out. */
function walkOn(open: readonly boolean[], a: number, minutes: number): number {
  if (minutes === 0) return open.indexOf(true, a);
  let left = minutes;
  for (let i = a; i < open.length; i++) {
    if (open[i]) left -= 1;
    if (left === 0) return i + 1;
  }
  return -1;
}

/** The index of the first of the last so many open minutes before a; of none the index after the last; -1 for too few. */
function walkBack(open: readonly boolean[], a: number, minutes: number): number {
  let left = minutes;
  for (let i = a - 1; i >= 0; i--) {
    if (!open[i]) continue;
    if (left === 0) return i + 1;
    left -= 1;
    if (left === 0) return i;
  }
  return -1;
}

/** The first index from a on at which so many minutes in a row are open; -1 when there is none. */
function wholeFrom(open: readonly boolean[], a: number, minutes: number): number {
  let row = 0;
  for (let i = a; i < open.length; i++) {
    row = open[i] ? row + 1 : 0;
    if (row > 0 && row >= minutes) return minutes === 0 ? i : i + 1 - minutes;
  }
  return -1;
}
