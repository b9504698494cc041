import { describe, expect, it } from 'vitest';
import { endOfWorkOn, workingDaysBetween } from './calendar';
import { spansOn, type Hours, type Span } from './hours';
import { formatInstant } from './instant';
import { addDays } from './zone';

const day: Span[] = [
  { from: 8 * 60, to: 12 * 60 },
  { from: 13 * 60, to: 17 * 60 },
];
const berlin: Hours = {
  zone: 'Europe/Berlin',
  weekly: [day, day, day, day, day, [], []],
  exceptions: [
    { date: '2026-12-24', spans: [{ from: 480, to: 720 }], reason: 'Half a day' },
    { date: '2026-12-25', spans: [] },
    { date: '2026-12-19', spans: day },
  ],
};

describe('the spans of a date', () => {
  it('are those of its exception, else of its weekday', () => {
    expect(spansOn(berlin, '2026-12-24')).toEqual([{ from: 480, to: 720 }]);
    expect(spansOn(berlin, '2026-12-25')).toEqual([]);
    expect(spansOn(berlin, '2026-12-19')).toEqual(day);
    expect(spansOn(berlin, '2026-12-20')).toEqual([]);
    expect(spansOn(berlin, '2026-12-21')).toEqual(day);
    expect(spansOn({ ...berlin, weekly: [] }, '2026-12-21')).toEqual([]);
  });
});

describe('the instant of a due date', () => {
  const end = (hours: Hours, date: string) => formatInstant(endOfWorkOn(hours, date)).slice(0, 16);
  it('is the end of work on that day, else on the last open day before', () => {
    expect(end(berlin, '2026-12-23')).toBe('2026-12-23T16:00');
    expect(end(berlin, '2026-12-24')).toBe('2026-12-24T11:00');
    expect(end(berlin, '2026-12-27')).toBe('2026-12-24T11:00');
    expect(end(berlin, '2026-12-20')).toBe('2026-12-19T16:00');
    expect(end(berlin, '2026-07-05')).toBe('2026-07-03T15:00');
  });

  it('looks sixty days back, then takes the end of the date', () => {
    const once = (date: string): Hours => ({
      zone: 'Europe/Berlin',
      weekly: [],
      exceptions: [{ date, spans: day }],
    });
    const due = '2026-12-31';
    expect(end(once(addDays(due, -60)), due)).toBe('2026-11-01T16:00');
    expect(end(once(addDays(due, -61)), due)).toBe('2026-12-31T23:00');
    expect(end({ zone: 'Africa/Cairo', weekly: [], exceptions: [] }, '2026-04-23')).toBe(
      '2026-04-23T22:00',
    );
  });

  it('of a day that clocks skipped is on the day before', () => {
    const apia = { zone: 'Pacific/Apia', weekly: Array(7).fill(day), exceptions: [] };
    expect(end(apia, '2011-12-30')).toBe('2011-12-30T03:00'); // 17:00 on the 29th
  });
});

describe('working days', () => {
  it('are those after the first date up to and with the second', () => {
    expect(workingDaysBetween(berlin, '2026-12-01', '2026-12-01')).toBe(0);
    expect(workingDaysBetween(berlin, '2026-12-01', '2026-12-02')).toBe(1);
    expect(workingDaysBetween(berlin, '2026-12-04', '2026-12-06')).toBe(0);
    expect(workingDaysBetween(berlin, '2026-12-04', '2026-12-07')).toBe(1);
    expect(workingDaysBetween(berlin, '2026-12-18', '2026-12-28')).toBe(1 + 3 + 1 + 1);
    expect(workingDaysBetween(berlin, '2026-12-07', '2026-12-04')).toBe(-1);
    // Not minus zero, which is another number to whoever compares.
    expect(workingDaysBetween(berlin, '2026-12-06', '2026-12-04')).toBe(0);
  });

  it('are as many as a walk day by day finds', () => {
    // From each of the exceptions as well: the first date itself does not count.
    for (let length = 0; length <= 30; length++) {
      for (let first = 0; first < 28; first++) {
        const from = addDays('2026-12-01', first);
        const walked = Array.from({ length }, (_, i) => addDays(from, i + 1)).filter(
          (date) => spansOn(berlin, date).length > 0,
        ).length;
        expect(workingDaysBetween(berlin, from, addDays(from, length))).toBe(walked);
      }
    }
  });

  it('are counted over millennia as well, by whole weeks', () => {
    // The calendar repeats every 400 years, which are 20 871 whole weeks.
    const plain = { ...berlin, exceptions: [] };
    const cycle = workingDaysBetween(plain, '2026-12-01', '2426-12-01');
    expect(cycle).toBe(20_871 * 5);
    expect(workingDaysBetween(plain, '2026-12-01', '9626-12-01')).toBe(19 * cycle);
  });
});
