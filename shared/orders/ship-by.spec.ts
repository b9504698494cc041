import { describe, expect, it } from 'vitest';
import type { Hours } from '#shared/time/hours';
import { shipByOf } from './ship-by';

const DAY = [{ from: 480, to: 960 }];
const WEEKDAYS: Hours = {
  zone: 'Europe/Vienna',
  weekly: [DAY, DAY, DAY, DAY, DAY, [], []],
  exceptions: [],
};

describe('shipByOf', () => {
  it('goes back over working days: transit first, then packing', () => {
    // 2026-12-18 is a Friday.
    expect(shipByOf(WEEKDAYS, '2026-12-18', { transitDays: 2, packingDays: 1 })).toBe('2026-12-15');
    expect(shipByOf(WEEKDAYS, '2026-12-14', { transitDays: 2, packingDays: 1 })).toBe('2026-12-09');
  });

  it('counts from a day off as from the day itself', () => {
    // Due on Sunday: handed over on Friday for one day of transit.
    expect(shipByOf(WEEKDAYS, '2026-12-20', { transitDays: 1, packingDays: 0 })).toBe('2026-12-18');
  });

  it('leaves out days that the shop is closed on', () => {
    const closed: Hours = {
      ...WEEKDAYS,
      exceptions: [{ date: '2026-12-17', spans: [], reason: 'inventory' }],
    };
    expect(shipByOf(closed, '2026-12-18', { transitDays: 1, packingDays: 1 })).toBe('2026-12-15');
  });

  it('takes a Saturday that is worked for once', () => {
    const open: Hours = { ...WEEKDAYS, exceptions: [{ date: '2026-12-19', spans: DAY }] };
    expect(shipByOf(open, '2026-12-21', { transitDays: 1, packingDays: 0 })).toBe('2026-12-19');
  });

  it('with no time for transit or packing is the due date or the last working day before it', () => {
    const none = { transitDays: 0, packingDays: 0 };
    expect(shipByOf(WEEKDAYS, '2026-12-18', none)).toBe('2026-12-18');
    expect(shipByOf(WEEKDAYS, '2026-12-20', none)).toBe('2026-12-18');
  });

  it('counts every day for a shop without hours', () => {
    const never: Hours = { ...WEEKDAYS, weekly: [[], [], [], [], [], [], []] };
    expect(shipByOf(never, '2026-12-20', { transitDays: 2, packingDays: 1 })).toBe('2026-12-17');
  });
});
