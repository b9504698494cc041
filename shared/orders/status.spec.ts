import { describe, expect, it } from 'vitest';
import type { Place } from '#shared/route/route';
import { lineStanding, orderStanding, type LineMaker } from './status';

function maker(place: Place, boards: number, more: Partial<LineMaker> = {}): LineMaker {
  return { place, boards, progressPercent: 0, readyAt: null, ...more };
}

describe('lineStanding', () => {
  it.each<[string, number, LineMaker[], string]>([
    ['no batch', 4, [], 'RECEIVED'],
    ['a batch in the queue', 4, [maker('QUEUED', 4)], 'PLANNED'],
    ['one of two on the floor', 8, [maker('QUEUED', 4), maker('BLANK', 4)], 'IN_WORK'],
    ['all ready', 8, [maker('READY', 4), maker('READY', 4)], 'READY'],
    ['ready and shipped', 8, [maker('READY', 4), maker('SHIPPED', 4)], 'READY'],
    ['all shipped', 8, [maker('SHIPPED', 4), maker('SHIPPED', 4)], 'SHIPPED'],
    ['ready, but too few boards', 8, [maker('READY', 7)], 'IN_WORK'],
    ['shipped, but too few boards', 8, [maker('SHIPPED', 7)], 'IN_WORK'],
    ['queued, and too few boards', 8, [maker('QUEUED', 1)], 'PLANNED'],
    ['more than enough', 8, [maker('READY', 10)], 'READY'],
  ])('%s', (_, count, makers, status) => {
    expect(lineStanding(count, makers).status).toBe(status);
  });

  it('stands in the least advanced stage of its batches', () => {
    expect(lineStanding(8, [maker('SAND', 4), maker('SLICE', 4)]).stage).toBe('SLICE');
    expect(lineStanding(8, []).stage).toBeNull();
  });

  it('weighs progress by boards, and boards that no batch makes have none', () => {
    const makers = [
      maker('SAND', 6, { progressPercent: 50 }),
      maker('READY', 2, { progressPercent: 100 }),
    ];
    expect(lineStanding(8, makers).progressPercent).toBe(62);
    expect(lineStanding(16, makers).progressPercent).toBe(31);
    expect(lineStanding(8, []).progressPercent).toBe(0);
  });

  it('never has more than a hundred percent', () => {
    const done = maker('READY', 12, { progressPercent: 100 });
    expect(lineStanding(8, [done]).progressPercent).toBe(100);
  });

  it('is ready when its last batch is, if that is known of every board', () => {
    const early = maker('SAND', 4, { readyAt: 1_000 });
    const late = maker('SLICE', 4, { readyAt: 5_000 });
    expect(lineStanding(8, [late, early]).readyAt).toBe(5_000);
    expect(lineStanding(9, [late, early]).readyAt).toBeNull();
    expect(lineStanding(8, [late, maker('SLICE', 4)]).readyAt).toBeNull();
    expect(lineStanding(8, []).readyAt).toBeNull();
  });
});

describe('orderStanding', () => {
  it('stands where its least advanced line does', () => {
    const lines = [
      { count: 4, ...lineStanding(4, [maker('READY', 4, { progressPercent: 100, readyAt: 10 })]) },
      {
        count: 12,
        ...lineStanding(12, [maker('SLICE', 12, { progressPercent: 40, readyAt: 20 })]),
      },
    ];
    expect(orderStanding(lines)).toEqual({
      status: 'IN_WORK',
      stage: 'SLICE',
      progressPercent: 55,
      readyAt: 20,
    });
  });

  it('is not ready by any date while a line has no batch', () => {
    const made = { count: 4, ...lineStanding(4, [maker('READY', 4, { readyAt: 10 })]) };
    const open = { count: 4, ...lineStanding(4, []) };
    expect(orderStanding([made, open])).toMatchObject({ status: 'RECEIVED', readyAt: null });
  });
});
