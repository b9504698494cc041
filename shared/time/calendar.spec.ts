import { describe, expect, it } from 'vitest';
import {
  addWorkingMinutes,
  buildCalendar,
  firstWholeSpan,
  intersect,
  isOpen,
  nextOpen,
  subtractWorkingMinutes,
  workingMinutesBetween,
  type Calendar,
} from './calendar';
import type { Hours, HoursException, Span } from './hours';
import { DAY_MS, formatInstant, MINUTE_MS, parseInstant } from './instant';

const day: Span[] = [
  { from: 8 * 60, to: 12 * 60 },
  { from: 13 * 60, to: 17 * 60 },
];
const week = [day, day, day, day, day, [], []];
const berlin: Hours = { zone: 'Europe/Berlin', weekly: week, exceptions: [] };

const at = (text: string) => parseInstant(`${text}Z`);
const text = (instant: number | null) =>
  instant === null ? null : formatInstant(instant).slice(0, 16);
const intervals = ({ starts, ends }: Calendar) =>
  starts.map((start, i) => `${text(start)}/${text(ends[i] ?? null)?.slice(11)}`);

/** The calendar of the days around one date on which every day has the same spans. */
function around(zone: string, date: string, spans: readonly Span[], exceptions?: HoursException[]) {
  const noon = at(`${date}T12:00`);
  const hours = { zone, weekly: Array(7).fill([]), exceptions: exceptions ?? [{ date, spans }] };
  return buildCalendar(hours, noon - 3 * DAY_MS, noon + 3 * DAY_MS);
}

const minutesIn = (calendar: Calendar) => workingMinutesBetween(calendar, -8e15, 8e15);

describe('a calendar', () => {
  it('holds the weekly hours in UTC, cut to its bounds', () => {
    // Friday 10:00 to Monday 14:00 in Berlin.
    const calendar = buildCalendar(berlin, at('2026-12-04T09:00'), at('2026-12-07T13:00'));
    expect(intervals(calendar)).toEqual([
      '2026-12-04T09:00/11:00',
      '2026-12-04T12:00/16:00',
      '2026-12-07T07:00/11:00',
      '2026-12-07T12:00/13:00',
    ]);
  });

  it('closes and opens on exceptions', () => {
    const exceptions = [
      { date: '2026-12-04', spans: [] },
      { date: '2026-12-05', spans: [{ from: 540, to: 600 }] },
    ];
    const hours = { ...berlin, exceptions };
    expect(intervals(buildCalendar(hours, at('2026-12-04T00:00'), at('2026-12-07T00:00')))).toEqual(
      ['2026-12-05T08:00/09:00'],
    );
  });

  it('is one interval where spans touch, across midnight too', () => {
    const hours = { ...berlin, weekly: Array(7).fill([{ from: 0, to: 1440 }]) };
    const calendar = buildCalendar(hours, at('2026-03-01T00:00'), at('2026-11-01T00:00'));
    expect(calendar.starts).toEqual([at('2026-03-01T00:00')]);
    expect(calendar.ends).toEqual([at('2026-11-01T00:00')]);
  });

  it('is empty between instants that are not in order', () => {
    const noon = at('2026-12-04T11:30');
    expect(buildCalendar(berlin, noon, noon).starts).toEqual([]);
    expect(buildCalendar(berlin, noon + DAY_MS, noon - DAY_MS).starts).toEqual([]);
  });

  it('is shared by two where both are open', () => {
    const bounds = [at('2026-12-01T00:00'), at('2026-12-02T00:00')] as const;
    const late = { ...berlin, weekly: Array(7).fill([{ from: 11 * 60, to: 20 * 60 }]) };
    const both = intersect(buildCalendar(berlin, ...bounds), buildCalendar(late, ...bounds));
    expect(intervals(both)).toEqual(['2026-12-01T10:00/11:00', '2026-12-01T12:00/16:00']);
    expect(minutesIn(both)).toBe(300);
    const early = { ...berlin, weekly: Array(7).fill([{ from: 6 * 60, to: 8 * 60 }]) };
    expect(
      intersect(buildCalendar(berlin, ...bounds), buildCalendar(early, ...bounds)).starts,
    ).toEqual([]);
  });
});

describe('hours on the night of a change of clocks', () => {
  const night = [{ from: 60, to: 240 }];
  it.each([
    ['Europe/Berlin', '2026-03-29', night, 120],
    ['Europe/Berlin', '2026-10-25', night, 240],
    ['Europe/Berlin', '2026-03-30', night, 180],
    ['Australia/Lord_Howe', '2026-10-04', night, 150],
    ['Australia/Lord_Howe', '2026-04-05', night, 210],
    ['America/Sao_Paulo', '2018-11-04', [{ from: 0, to: 120 }], 60],
    ['America/Sao_Paulo', '2018-02-17', [{ from: 1320, to: 1440 }], 180],
    ['Africa/Cairo', '2026-04-24', [{ from: 0, to: 1440 }], 23 * 60],
    ['Africa/Cairo', '2026-10-29', [{ from: 0, to: 1440 }], 25 * 60],
    ['America/St_Johns', '2010-03-14', [{ from: 0, to: 120 }], 60],
    ['Asia/Kathmandu', '1986-01-01', [{ from: 0, to: 1440 }], 24 * 60 - 15],
    ['Pacific/Apia', '2011-12-30', [{ from: 0, to: 1440 }], 0],
    ['Pacific/Apia', '2011-12-31', [{ from: 0, to: 1440 }], 24 * 60],
  ])('in %s on %s are as long as they really are', (zone, date, spans, minutes) => {
    expect(minutesIn(around(zone, date, spans))).toBe(minutes);
  });

  it('end and begin with the skip when their edge is skipped', () => {
    const date = '2026-03-29';
    expect(intervals(around('Europe/Berlin', date, [{ from: 60, to: 150 }]))).toEqual([
      '2026-03-29T00:00/01:00',
    ]);
    expect(intervals(around('Europe/Berlin', date, [{ from: 150, to: 240 }]))).toEqual([
      '2026-03-29T01:00/02:00',
    ]);
    expect(intervals(around('Europe/Berlin', date, [{ from: 120, to: 180 }]))).toEqual([]);
    expect(intervals(around('Europe/Berlin', date, [{ from: 165, to: 195 }]))).toEqual([
      '2026-03-29T01:00/01:15',
    ]);
  });

  it('are one stretch when their edge comes twice', () => {
    const date = '2026-10-25';
    expect(intervals(around('Europe/Berlin', date, [{ from: 60, to: 150 }]))).toEqual([
      '2026-10-24T23:00/00:30',
    ]);
    expect(intervals(around('Europe/Berlin', date, [{ from: 150, to: 240 }]))).toEqual([
      '2026-10-25T00:30/03:00',
    ]);
  });

  it('of a day that was skipped do not open the next', () => {
    const friday = { zone: 'Pacific/Apia', weekly: [[], [], [], [], day, [], []], exceptions: [] };
    const calendar = buildCalendar(friday, at('2011-12-28T00:00'), at('2012-01-03T00:00'));
    expect(calendar.starts).toEqual([]);
  });
});

describe('questions to a calendar', () => {
  // Friday 4 December to Tuesday 8 December; 07:00-11:00 and 12:00-16:00 UTC on Friday, Monday, Tuesday.
  const calendar = buildCalendar(berlin, at('2026-12-04T00:00'), at('2026-12-09T00:00'));
  const empty = buildCalendar(berlin, 0, 0);

  it('whether it is open', () => {
    expect(isOpen(calendar, at('2026-12-04T06:59'))).toBe(false);
    expect(isOpen(calendar, at('2026-12-04T07:00'))).toBe(true);
    expect(isOpen(calendar, at('2026-12-04T11:00') - 1)).toBe(true);
    expect(isOpen(calendar, at('2026-12-04T11:00'))).toBe(false);
    expect(isOpen(calendar, at('2026-12-08T16:00'))).toBe(false);
    expect(isOpen(empty, 0)).toBe(false);
  });

  it('when it is open next', () => {
    expect(text(nextOpen(calendar, at('2026-12-04T09:30')))).toBe('2026-12-04T09:30');
    expect(text(nextOpen(calendar, at('2026-12-04T11:00')))).toBe('2026-12-04T12:00');
    expect(text(nextOpen(calendar, at('2026-12-04T16:00')))).toBe('2026-12-07T07:00');
    expect(nextOpen(calendar, at('2026-12-08T16:00'))).toBeNull();
    expect(nextOpen(empty, 0)).toBeNull();
  });

  it('how long it is open between two instants', () => {
    const between = (a: string, b: string) => workingMinutesBetween(calendar, at(a), at(b));
    expect(between('2026-12-04T10:00', '2026-12-04T13:00')).toBe(120);
    expect(between('2026-12-04T15:00', '2026-12-07T08:00')).toBe(120);
    expect(between('2026-12-01T00:00', '2026-12-31T00:00')).toBe(3 * 480);
    expect(between('2026-12-04T11:10', '2026-12-04T11:50')).toBe(0);
    expect(between('2026-12-07T08:00', '2026-12-04T15:00')).toBe(0);
    expect(
      workingMinutesBetween(calendar, at('2026-12-04T08:00'), at('2026-12-04T08:00') + 1),
    ).toBe(1 / MINUTE_MS);
  });

  it('when pausable work is done', () => {
    const done = (start: string, minutes: number) =>
      text(addWorkingMinutes(calendar, at(start), minutes));
    expect(done('2026-12-04T07:00', 60)).toBe('2026-12-04T08:00');
    expect(done('2026-12-04T10:00', 60)).toBe('2026-12-04T11:00'); // fills the span: not 12:00
    expect(done('2026-12-04T10:00', 61)).toBe('2026-12-04T12:01');
    expect(done('2026-12-04T15:30', 60)).toBe('2026-12-07T07:30');
    expect(done('2026-12-05T00:00', 480)).toBe('2026-12-07T16:00');
    expect(done('2026-12-04T00:00', 3 * 480)).toBe('2026-12-08T16:00');
    expect(done('2026-12-04T00:00', 3 * 480 + 1)).toBeNull();
    expect(done('2026-12-04T07:00', Infinity)).toBeNull();
    expect(done('2026-12-08T16:00', 1)).toBeNull();
  });

  it('when work of no minutes is done: at the first open instant', () => {
    const done = (start: string) => text(addWorkingMinutes(calendar, at(start), 0));
    expect(done('2026-12-04T09:30')).toBe('2026-12-04T09:30');
    expect(done('2026-12-04T11:00')).toBe('2026-12-04T12:00');
    expect(done('2026-12-05T00:00')).toBe('2026-12-07T07:00');
    expect(done('2026-12-08T16:00')).toBeNull();
  });

  it('when work that must be done by a time begins at the latest', () => {
    const begun = (end: string, minutes: number) =>
      text(subtractWorkingMinutes(calendar, at(end), minutes));
    expect(begun('2026-12-04T09:00', 60)).toBe('2026-12-04T08:00');
    expect(begun('2026-12-04T13:00', 60)).toBe('2026-12-04T12:00'); // fills the span: not 11:00
    expect(begun('2026-12-04T13:00', 61)).toBe('2026-12-04T10:59');
    expect(begun('2026-12-07T06:00', 30)).toBe('2026-12-04T15:30');
    expect(begun('2026-12-31T00:00', 3 * 480)).toBe('2026-12-04T07:00');
    expect(begun('2026-12-31T00:00', 3 * 480 + 1)).toBeNull();
    expect(begun('2026-12-04T11:30', 0)).toBe('2026-12-04T11:00');
    expect(begun('2026-12-04T12:00', 0)).toBe('2026-12-04T11:00');
    expect(begun('2026-12-04T12:30', 0)).toBe('2026-12-04T12:30');
    expect(begun('2026-12-04T07:00', 0)).toBeNull();
  });

  it('when work fits whole into a span', () => {
    const slot = (start: string, minutes: number) => {
      const found = firstWholeSpan(calendar, at(start), minutes);
      return found && [text(found.start), text(found.end)];
    };
    expect(slot('2026-12-04T07:00', 240)).toEqual(['2026-12-04T07:00', '2026-12-04T11:00']);
    expect(slot('2026-12-04T07:01', 240)).toEqual(['2026-12-04T12:00', '2026-12-04T16:00']);
    expect(slot('2026-12-04T12:01', 240)).toEqual(['2026-12-07T07:00', '2026-12-07T11:00']);
    expect(slot('2026-12-04T11:00', 0)).toEqual(['2026-12-04T12:00', '2026-12-04T12:00']);
    expect(slot('2026-12-04T07:00', 241)).toBeNull();
    expect(slot('2026-12-08T12:01', 240)).toBeNull();
  });

  it('are answered in whole milliseconds and refuse less than no minutes', () => {
    expect(addWorkingMinutes(calendar, at('2026-12-04T07:00'), 1 / 3)).toBe(
      at('2026-12-04T07:00') + 20_000,
    );
    for (const minutes of [-1, Number.NaN]) {
      expect(() => addWorkingMinutes(calendar, 0, minutes)).toThrow(RangeError);
      expect(() => subtractWorkingMinutes(calendar, 0, minutes)).toThrow(RangeError);
      expect(() => firstWholeSpan(calendar, 0, minutes)).toThrow(RangeError);
    }
  });
});
