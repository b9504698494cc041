import { describe, expect, it } from 'vitest';
import { formatInstant, parseInstant } from './instant';
import {
  addDays,
  daysBetween,
  isLocalDate,
  isZone,
  offsetMinutes,
  toInstant,
  toLocal,
  weekdayOf,
  whenReached,
} from './zone';

const instant = (zone: string, date: string, clock: string) =>
  formatInstant(toInstant(zone, date, minute(clock)));
const reached = (zone: string, date: string, clock: string) =>
  formatInstant(whenReached(zone, date, minute(clock)));
const minute = (clock: string) => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3));

describe('zone names', () => {
  it('are those of the IANA database', () => {
    for (const name of ['Europe/Berlin', 'America/St_Johns', 'Asia/Kolkata', 'UTC', 'Etc/GMT+5']) {
      expect(isZone(name), name).toBe(true);
    }
    for (const name of ['', ' ', 'Europe/Nowhere', '+01:00', '-0530', 'Berlin', 'Europe/Berlin ']) {
      expect(isZone(name), name).toBe(false);
    }
  });

  it('that are unknown are refused wherever a clock is read', () => {
    expect(() => offsetMinutes('Europe/Nowhere', 0)).toThrow(RangeError);
    expect(() => toLocal('Europe/Nowhere', 0)).toThrow(RangeError);
  });
});

describe('offsets', () => {
  it.each([
    ['UTC', '2026-07-01T00:00:00Z', 0],
    ['Europe/Berlin', '2026-12-01T00:00:00Z', 60],
    ['Europe/Berlin', '2026-07-01T00:00:00Z', 120],
    ['Asia/Kolkata', '2026-07-01T00:00:00Z', 330],
    ['Asia/Kathmandu', '2026-07-01T00:00:00Z', 345],
    ['Australia/Lord_Howe', '2026-07-01T00:00:00Z', 630],
    ['Australia/Lord_Howe', '2026-12-01T00:00:00Z', 660],
    ['Pacific/Chatham', '2026-12-01T00:00:00Z', 825],
    ['Pacific/Marquesas', '2026-12-01T00:00:00Z', -570],
  ])('of %s at %s', (zone, at, minutes) => {
    expect(offsetMinutes(zone, parseInstant(at))).toBe(minutes);
  });

  it.each([
    ['Europe/Berlin', '2026-03-29T01:00:00Z', 60, 120],
    ['Europe/Berlin', '2026-10-25T01:00:00Z', 120, 60],
    ['Australia/Lord_Howe', '2026-04-04T15:00:00Z', 660, 630],
    ['Asia/Kathmandu', '1985-12-31T18:30:00Z', 330, 345],
    ['Pacific/Apia', '2011-12-30T10:00:00Z', -600, 840],
    // At one minute past midnight, not on a quarter of an hour.
    ['America/St_Johns', '2010-03-14T03:31:00Z', -210, -150],
    // Offsets with seconds: 44 min 30 s behind.
    ['Africa/Monrovia', '1972-01-07T00:44:30Z', -44.5, 0],
  ])('of %s change at %s to the millisecond', (zone, at, before, after) => {
    expect(offsetMinutes(zone, parseInstant(at) - 1)).toBe(before);
    expect(offsetMinutes(zone, parseInstant(at))).toBe(after);
  });
});

describe('an instant on the wall', () => {
  it('has a date, a clock, a weekday and a minute of the day', () => {
    expect(toLocal('Europe/Berlin', parseInstant('2026-12-06T23:07:59.999Z'))).toEqual({
      date: '2026-12-07',
      time: '00:07',
      weekday: 1,
      minuteOfDay: 7,
    });
    expect(toLocal('America/New_York', parseInstant('2026-12-07T04:59:00Z'))).toEqual({
      date: '2026-12-06',
      time: '23:59',
      weekday: 7,
      minuteOfDay: 1439,
    });
  });

  it('skips the day that Samoa skipped', () => {
    const last = parseInstant('2011-12-30T09:59:59Z');
    expect(toLocal('Pacific/Apia', last)).toMatchObject({ date: '2011-12-29', time: '23:59' });
    expect(toLocal('Pacific/Apia', last + 1000)).toMatchObject({
      date: '2011-12-31',
      time: '00:00',
    });
  });
});

describe('a wall time as an instant', () => {
  it('is found on both sides of UTC and up to the end of the day', () => {
    expect(instant('Europe/Berlin', '2026-12-01', '07:30')).toBe('2026-12-01T06:30:00.000Z');
    expect(instant('Pacific/Kiritimati', '2026-12-01', '00:00')).toBe('2026-11-30T10:00:00.000Z');
    expect(instant('Pacific/Pago_Pago', '2026-12-01', '24:00')).toBe('2026-12-02T11:00:00.000Z');
  });

  it.each([
    ['Europe/Berlin', '2026-03-29', '02:30', '2026-03-29T01:30:00.000Z'], // 03:30
    ['Australia/Lord_Howe', '2026-10-04', '02:10', '2026-10-03T15:40:00.000Z'], // 02:40
    ['America/Sao_Paulo', '2018-11-04', '00:00', '2018-11-04T03:00:00.000Z'], // 01:00
    ['Africa/Cairo', '2026-04-24', '00:15', '2026-04-23T22:15:00.000Z'], // 01:15
    ['Pacific/Apia', '2011-12-30', '12:00', '2011-12-30T22:00:00.000Z'], // noon on the 31st
  ])('that %s skips on %s at %s moves forward by the skip', (zone, date, clock, at) => {
    expect(instant(zone, date, clock)).toBe(at);
  });

  it.each([
    ['Europe/Berlin', '2026-10-25', '02:30', '2026-10-25T00:30:00.000Z'],
    ['America/New_York', '2026-11-01', '01:00', '2026-11-01T05:00:00.000Z'],
    ['Australia/Lord_Howe', '2026-04-05', '01:45', '2026-04-04T14:45:00.000Z'],
    ['America/Sao_Paulo', '2018-02-17', '23:30', '2018-02-18T01:30:00.000Z'],
  ])('that comes twice in %s on %s at %s is the first', (zone, date, clock, at) => {
    expect(instant(zone, date, clock)).toBe(at);
  });

  it('is none for what is no date', () => {
    expect(() => toInstant('UTC', 'soon', 0)).toThrow(RangeError);
  });
});

describe('when a clock reaches a time', () => {
  it('is the moment of the skip for all that is skipped, so that times keep their order', () => {
    for (const clock of ['02:00', '02:01', '02:59', '03:00']) {
      expect(reached('Europe/Berlin', '2026-03-29', clock)).toBe('2026-03-29T01:00:00.000Z');
    }
    expect(reached('Europe/Berlin', '2026-03-29', '01:59')).toBe('2026-03-29T00:59:00.000Z');
    expect(reached('Europe/Berlin', '2026-03-29', '03:01')).toBe('2026-03-29T01:01:00.000Z');
    for (const clock of ['00:00', '09:00', '24:00']) {
      expect(reached('Pacific/Apia', '2011-12-30', clock)).toBe('2011-12-30T10:00:00.000Z');
    }
    expect(reached('America/St_Johns', '2010-03-14', '00:30')).toBe('2010-03-14T03:31:00.000Z');
  });

  it('is the first time of a time that comes twice', () => {
    expect(reached('Europe/Berlin', '2026-10-25', '02:30')).toBe('2026-10-25T00:30:00.000Z');
    expect(reached('Europe/Berlin', '2026-10-25', '03:00')).toBe('2026-10-25T02:00:00.000Z');
  });
});

describe('dates', () => {
  it('are added to and counted over months, leap days and changes of clocks', () => {
    expect(addDays('2026-12-31', 1)).toBe('2027-01-01');
    expect(addDays('2028-02-28', 1)).toBe('2028-02-29');
    expect(addDays('2027-02-28', 1)).toBe('2027-03-01');
    expect(addDays('2026-03-30', -2)).toBe('2026-03-28');
    expect(daysBetween('2026-03-28', '2026-03-30')).toBe(2);
    expect(daysBetween('2026-10-26', '2026-10-24')).toBe(-2);
    expect(daysBetween('2026-01-01', '2027-01-01')).toBe(365);
    expect(() => addDays('9999-12-31', 1)).toThrow(RangeError);
    expect(() => addDays('soon', 1)).toThrow(RangeError);
  });

  it('have weekdays from Monday, 1, to Sunday, 7', () => {
    expect(weekdayOf('2026-11-30')).toBe(1);
    expect(weekdayOf('2026-12-06')).toBe(7);
    expect(weekdayOf('2028-02-29')).toBe(2);
  });

  it('exist or do not', () => {
    for (const date of ['2026-12-01', '2028-02-29', '1000-01-01', '9999-12-31']) {
      expect(isLocalDate(date), date).toBe(true);
    }
    for (const text of [
      '',
      '2026-02-29',
      '2026-02-30',
      '2026-13-01',
      '2026-00-10',
      '2026-12-00',
      '2026-12-1',
      '0999-12-31',
      '12026-12-01',
      '2026-12-01T00:00:00Z',
      ' 2026-12-01',
      '2026-12-01\n',
    ]) {
      expect(isLocalDate(text), JSON.stringify(text)).toBe(false);
    }
  });
});
