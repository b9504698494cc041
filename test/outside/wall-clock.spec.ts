import fc from 'fast-check';
import { DateTime } from 'luxon';
import { describe, expect, it } from 'vitest';
import { DAY_MS, MINUTE_MS } from '#shared/time/instant';
import { addDays, daysBetween, toInstant, toLocal, weekdayOf } from '#shared/time/zone';
import { CHANGES, PATIENCE, runs, SEED } from './clock-changes';
import { luxonInstants } from './luxon-calendar';

describe(`walls and waits against luxon (seed ${SEED})`, { timeout: PATIENCE }, () => {
  it('the zones do change where these tests look for it', () => {
    for (const [zone, date] of CHANGES) {
      const noon = DateTime.fromISO(`${date}T12:00`, { zone: 'utc' });
      const offset = (days: number) => noon.plus({ days }).setZone(zone).offset;
      expect(offset(-2), `${zone} ${date}`).not.toBe(offset(2));
    }
  });

  const instants = fc.oneof(
    fc.integer({ min: Date.UTC(1972, 5), max: Date.UTC(2060, 0) }),
    fc
      .constantFrom(...CHANGES)
      .chain(([, date]) =>
        fc
          .integer({ min: -2 * DAY_MS, max: 2 * DAY_MS })
          .map((shift) => Date.parse(`${date}T00:00:00Z`) + shift),
      ),
  );
  const zones = fc.oneof(
    fc.constantFrom(...CHANGES.map(([zone]) => zone)),
    fc.constantFrom(...Intl.supportedValuesOf('timeZone')),
  );

  it('an instant has the same wall time in any zone, and a wait is as long as it is', () => {
    fc.assert(
      fc.property(zones, instants, fc.integer({ min: 0, max: 5000 }), (zone, at, wait) => {
        const theirs = DateTime.fromMillis(at, { zone });
        expect(toLocal(zone, at)).toEqual({
          date: theirs.toFormat('yyyy-MM-dd'),
          time: theirs.toFormat('HH:mm'),
          weekday: theirs.weekday,
          minuteOfDay: theirs.hour * 60 + theirs.minute,
        });
        const clear = theirs.plus({ minutes: wait });
        expect(clear.toMillis()).toBe(at + wait * MINUTE_MS);
        expect(toLocal(zone, at + wait * MINUTE_MS).time).toBe(clear.toFormat('HH:mm'));
      }),
      runs(1000),
    );
  });

  it('a wall time is the first of its instants, or moved forward by the skip', () => {
    let skipped = 0;
    let twice = 0;
    fc.assert(
      fc.property(
        fc.constantFrom(...CHANGES),
        fc.integer({ min: -1, max: 1 }),
        fc.oneof(fc.integer({ min: 0, max: 1440 }), fc.integer({ min: 0, max: 200 })),
        ([zone, around], shift, minute) => {
          const date = addDays(around, shift);
          const [first, second] = luxonInstants(zone, date, minute);
          const mine = toInstant(zone, date, minute);
          if (first !== undefined) expect(mine).toBe(first);
          else {
            // What was skipped counts from the offset before the skip.
            const wall = DateTime.fromISO(date, { zone: 'utc' }).plus({ minutes: minute });
            const before = wall.minus({ hours: 24 }).setZone(zone).offset;
            expect(mine).toBe(wall.minus({ minutes: before }).toMillis());
            skipped += 1;
          }
          if (second !== undefined) twice += 1;
        },
      ),
      runs(1500),
    );
    expect(skipped).toBeGreaterThan(20);
    expect(twice).toBeGreaterThan(20);
  });

  it('dates add up, count and fall on the same weekdays', () => {
    const dates = fc
      .integer({ min: 0, max: 200_000 })
      .map((days) => DateTime.utc(1800, 1, 1).plus({ days }));
    fc.assert(
      fc.property(dates, fc.integer({ min: -40_000, max: 40_000 }), (date, n) => {
        const iso = date.toFormat('yyyy-MM-dd');
        const later = date.plus({ days: n }).toFormat('yyyy-MM-dd');
        expect(addDays(iso, n)).toBe(later);
        expect(daysBetween(iso, later)).toBe(n);
        expect(weekdayOf(iso)).toBe(date.weekday);
      }),
      runs(500),
    );
  });
});
