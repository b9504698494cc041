import { describe, expect, it } from 'vitest';
import { aBatch, aShop, HELPER, hours, MAKER, minutes, NOW } from '#test/factories/floor';
import { doneBefore, finish, move, start, WorkingFloor } from '#test/factories/working-floor';
import type { FloorShop, Station } from './model';
import { clampLoad, stationLoad } from './resources';

const two = () => [aBatch(), aBatch({ id: 'batch-2', code: 'CT-002' })];

function shopWith(station: Partial<Station> & { key: string }): FloorShop {
  const shop = aShop();
  return {
    ...shop,
    stations: shop.stations.map((each) =>
      each.key === station.key ? { ...each, ...station } : each,
    ),
  };
}

describe('clamps', () => {
  it('are taken from spreading until somebody has taken them off, through the night', () => {
    const floor = new WorkingFloor().milled();
    floor.give(start('glue-1', [1, 2]));
    expect(clampLoad(floor.shop, floor.batches, floor.now)).toEqual({ used: 8, capacity: 18 });
    floor.wait(minutes(25)).give(finish('glue-1', [1, 2]));
    // The clamped time is over after an hour; the clamps are on until the next morning.
    floor.wait(hours(14));
    expect(clampLoad(floor.shop, floor.batches, floor.now)).toEqual({ used: 8, capacity: 18 });
    floor.give(start('unclamp-1', [1]), HELPER);
    expect(clampLoad(floor.shop, floor.batches, floor.now).used).toBe(8);
    floor.wait(minutes(5)).give(finish('unclamp-1', [1]), HELPER);
    expect(clampLoad(floor.shop, floor.batches, floor.now).used).toBe(4);
    const [off] = floor.first.occupations.filter((o) => o.isClamps && o.until !== null);
    expect(off).toMatchObject({ piece: 1, since: NOW, until: floor.now });
  });

  it('the shortest that will do are taken first, and longer ones make up the number', () => {
    const clamps = [
      { key: 'longer', length: 900_000_000n, count: 4 },
      { key: 'short', length: 200_000_000n, count: 20 },
      { key: 'just', length: 300_000_000n, count: 3 },
    ];
    const floor = new WorkingFloor([aBatch()], aShop({ clamps })).milled();
    const { taken } = floor.give(start('glue-1', [1]));
    expect(taken.filter((o) => o.isClamps)).toMatchObject([
      { resource: 'just', amount: 3, piece: 1 },
      { resource: 'longer', amount: 1, piece: 1 },
    ]);
  });

  it('CLAMPS_FULL: says how many are needed, free and owned, and who gives some back first', () => {
    const clamps = [{ key: 'c', length: 300_000_000n, count: 7 }];
    const floor = new WorkingFloor([aBatch()], aShop({ clamps })).milled();
    expect(floor.refusal(start('glue-1', [1, 2]))).toEqual({
      code: 'CLAMPS_FULL',
      need: 8,
      free: 7,
      owned: 7,
      holder: null,
    });
    floor.give(start('glue-1', [1]));
    expect(floor.refusal(start('glue-1', [2]))).toEqual({
      code: 'CLAMPS_FULL',
      need: 4,
      free: 3,
      owned: 7,
      // Glue-up 25 min, clamped 1 h, taking off 5 min.
      holder: { batchCode: 'CT-001', freeAt: NOW + minutes(90) },
    });
    floor.wait(minutes(40)).give(finish('glue-1', [1]));
    expect(floor.refusal(start('glue-1', [2]))).toMatchObject({
      holder: { freeAt: NOW + minutes(40 + 60 + 5) },
    });
  });

  it('too short ones do not count', () => {
    const clamps = [{ key: 'c', length: 299_999_999n, count: 99 }];
    const floor = new WorkingFloor([aBatch()], aShop({ clamps })).milled();
    expect(floor.refusal(start('glue-1', [1]))).toMatchObject({ code: 'CLAMPS_FULL', owned: 0 });
  });

  it('are counted over the time a late fact is of', () => {
    const clamps = [{ key: 'c', length: 300_000_000n, count: 4 }];
    const [first, second] = two().map((batch) => doneBefore(batch, 'glue-1', NOW - hours(9)));
    if (!first || !second) throw new Error('There are two batches.');
    const floor = new WorkingFloor([first, second], aShop({ clamps }));
    floor.give(start('glue-1', [1]));
    floor.wait(minutes(30)).give(finish('glue-1', [1]));
    floor.unclamped([1]);
    const off = floor.now;
    floor.wait(minutes(20));
    expect(floor.code(start('glue-1', [1]), MAKER, floor.second)).toBe('OK');
    const during = { happenedAt: off - minutes(1) };
    expect(floor.refusal(start('glue-1', [1], during), MAKER, floor.second)).toMatchObject({
      code: 'CLAMPS_FULL',
      holder: { batchCode: 'CT-001', freeAt: off },
    });
    const after = { happenedAt: off };
    expect(floor.code(start('glue-1', [1], after), MAKER, floor.second)).toBe('OK');
  });
});

describe('a station', () => {
  it('STATION_FULL: that counts batches takes one batch once, and no second', () => {
    const floor = new WorkingFloor(two());
    floor.give(start('mill'));
    expect(floor.refusal(start('mill'), MAKER, floor.second)).toEqual({
      code: 'STATION_FULL',
      station: 'planer',
      capacity: 1,
      need: 1,
      free: 0,
      holder: { batchCode: 'CT-001', freeAt: NOW + minutes(15 + 4 * 6) },
    });
    expect(stationLoad(aShop().stations[0] as Station, floor.batches, NOW)).toEqual({
      used: 1,
      capacity: 1,
    });
  });

  it('that counts batches lets a batch work on several of its pieces', () => {
    const done = doneBefore(aBatch(), 'flatten-1', NOW - hours(20));
    const floor = new WorkingFloor([done]);
    floor.give(start('flatten-1', [1]));
    expect(floor.code(start('flatten-1', [2]))).toBe('OK');
  });

  it('a batch that had it is not there after somebody else came', () => {
    const done = two().map((batch) => doneBefore(batch, 'flatten-1', NOW - hours(20)));
    const floor = new WorkingFloor(done);
    floor.give(start('flatten-1', [1]));
    floor.wait(minutes(30)).give(finish('flatten-1', [1]));
    floor.wait(minutes(10)).give(start('flatten-1', [1]), MAKER, floor.second);
    floor.wait(minutes(10));
    const whenItHadIt = { happenedAt: NOW + minutes(20) };
    expect(floor.refusal(start('flatten-1', [2], whenItHadIt))).toMatchObject({
      code: 'STATION_FULL',
      station: 'planer',
    });
  });

  it('that counts pieces takes as many as it has room for', () => {
    const floor = new WorkingFloor([aBatch({ boards: 6 })]).milled();
    expect(floor.refusal(start('glue-1', [1, 2, 3]))).toMatchObject({
      code: 'STATION_FULL',
      station: 'glue bench',
      capacity: 2,
      need: 3,
      free: 2,
      holder: null,
    });
    floor.give(start('glue-1', [1, 2]));
    expect(floor.refusal(start('glue-1', [3]))).toMatchObject({ code: 'STATION_FULL', free: 0 });
    floor.wait(minutes(25)).give(finish('glue-1', [2]));
    expect(floor.code(start('glue-1', [3]))).toBe('OK');
  });

  it('that counts boards keeps them until they are wiped, and other batches find the rest', () => {
    const done = two().map((batch) => doneBefore(batch, 'oil-1', NOW - hours(48)));
    const floor = new WorkingFloor(done, shopWith({ key: 'oil-rack', capacity: 6 }));
    floor.give(start('oil-1'));
    floor.wait(minutes(20)).give(finish('oil-1'));
    expect(floor.refusal(start('oil-1'), MAKER, floor.second)).toMatchObject({
      code: 'STATION_FULL',
      station: 'oil rack',
      need: 4,
      free: 2,
      // Soak 1 h, wiping 5 + 4 x 2 min.
      holder: { batchCode: 'CT-001', freeAt: NOW + minutes(20 + 60 + 13) },
    });
    expect(floor.refusal(start('wipe-1'))).toMatchObject({ code: 'HOLD_RUNNING', kind: 'SOAK' });
    floor.wait(hours(1)).give(start('wipe-1'));
    expect(floor.code(start('oil-1'), MAKER, floor.second)).toBe('STATION_FULL');
    floor.give(finish('wipe-1'));
    expect(floor.code(start('oil-1'), MAKER, floor.second)).toBe('OK');
    expect(floor.refusal(start('oil-2'))).toMatchObject({ code: 'HOLD_RUNNING', kind: 'DWELL' });
    expect(floor.wait(hours(24)).code(start('oil-2'))).toBe('OK');
  });

  it('that counts boards takes a piece’s share of them', () => {
    const shop = shopWith({ key: 'glue-bench', unit: 'BOARD', capacity: 3 });
    const floor = new WorkingFloor([aBatch()], shop).milled();
    expect(floor.refusal(start('glue-1', [1, 2]))).toMatchObject({ need: 4, free: 3 });
    expect(floor.code(start('glue-1', [1]))).toBe('OK');
  });

  it('that the shop has given up limits nothing', () => {
    const floor = new WorkingFloor(two(), aShop({ stations: [] }));
    floor.give(start('mill'));
    expect(floor.first.occupations).toEqual([]);
    expect(floor.code(start('mill'), MAKER, floor.second)).toBe('OK');
  });

  it('is free again when the batch is moved on', () => {
    const floor = new WorkingFloor(two());
    floor.give(start('mill'));
    floor.wait(minutes(5)).give(move('FIRST_GLUE_UP'));
    expect(floor.code(start('mill'), MAKER, floor.second)).toBe('OK');
  });

  it('is given back by the last of the pieces, whichever is recorded last', () => {
    const batch = doneBefore(aBatch(), 'flatten-1', NOW - hours(20));
    const steps = batch.route.steps.map((step) =>
      step.key === 'flatten-1' && step.kind === 'WORK'
        ? { ...step, station: null }
        : step.key === 'rip' && step.kind === 'WORK'
          ? { ...step, takes: [{ resource: 'oil-rack', until: 'flatten-1' }] }
          : step,
    );
    const waiting = { ...batch, route: { id: 'r', steps } };
    const floor = new WorkingFloor([
      {
        ...waiting,
        occupations: [
          {
            resource: 'oil-rack',
            isClamps: false,
            amount: 4,
            step: 'rip',
            piece: 0,
            since: NOW - hours(20),
            until: null,
          },
        ],
      },
    ]);
    floor.give(start('flatten-1', [1, 2]));
    floor.wait(minutes(40)).give(finish('flatten-1', [1]));
    expect(floor.first.occupations).toMatchObject([{ until: null }]);
    floor.give(finish('flatten-1', [2], { happenedAt: NOW + minutes(20) }));
    expect(floor.first.occupations).toMatchObject([{ until: NOW + minutes(40) }]);
  });
});
