import { describe, expect, it } from 'vitest';
import { aBatch, aRoute, HELPER, hours, MAKER, minutes, NOW, OWNER } from '#test/factories/floor';
import {
  doneBefore,
  finish,
  move,
  overriding,
  start,
  WorkingFloor,
} from '#test/factories/working-floor';
import { cardOf } from './card';
import { placeOf } from './progress';

const reason = 'a strip was cupped';

describe('moving forward', () => {
  it('finishes the steps in between, and gives back what they held', () => {
    const floor = new WorkingFloor();
    floor.give(start('mill'));
    floor.wait(minutes(5));
    floor.give(move('FIRST_GLUE_UP'), HELPER);
    expect(floor.first.runs.map((run) => [run.step, run.startedAt, run.finishedAt])).toEqual([
      ['mill', NOW, floor.now],
      ['rip', floor.now, floor.now],
    ]);
    expect(floor.first.occupations).toMatchObject([{ resource: 'planer', until: floor.now }]);
  });

  it('lets a batch onto the floor', () => {
    const floor = new WorkingFloor([aBatch({ releasedAt: null })]);
    floor.give(move('BLANK'), HELPER);
    expect(placeOf(floor.first, NOW)).toBe('BLANK');
    expect(floor.first.releasedAt).toBe(NOW);
  });

  it('enters a ready shelf though the station there is full', () => {
    const at = NOW - hours(30);
    const busy = doneBefore(aBatch({ id: 'batch-2', code: 'CT-002' }), 'flatten-2', at);
    const floor = new WorkingFloor([doneBefore(aBatch(), 'unclamp-2', at), busy]);
    floor.give(start('flatten-2'), MAKER, floor.second);
    floor.give(move('SURFACE'), HELPER);
    expect(placeOf(floor.first, NOW)).toBe('SURFACE');
    expect(floor.refusal(start('flatten-2'))).toMatchObject({
      code: 'STATION_FULL',
      station: 'planer',
      holder: { batchCode: 'CT-002', freeAt: NOW + minutes(15 + 4 * 8) },
    });
  });

  it('HOLD_RUNNING: keeps a batch from the next stage until the glue has cured', () => {
    const floor = new WorkingFloor().milled().glued();
    const cured = floor.now + hours(12);
    floor.unclamped();
    expect(floor.refusal(move('SLICE'))).toMatchObject({
      code: 'HOLD_RUNNING',
      kind: 'CURE',
      clearAt: cured,
      minMinutes: 720,
      source: 'D3 white glue',
      referenceTenthsC: 200,
    });
    expect(placeOf(floor.first, cured - 1)).toBe('FIRST_GLUE_UP');
    expect(placeOf(floor.first, cured)).toBe('SLICE');
  });

  it('BEFORE_THE_FACT_BEFORE: not to a time at which a hold that is over now still ran', () => {
    const floor = new WorkingFloor().milled().glued();
    const cured = floor.now + hours(12);
    floor.wait(hours(13));
    const early = { happenedAt: cured - minutes(30) };
    expect(floor.refusal(move('SLICE', early))).toEqual({
      code: 'BEFORE_THE_FACT_BEFORE',
      earliest: cured,
    });
    expect(floor.code(move('SLICE'))).toBe('OK');
  });

  it('HOLD_AHEAD: cannot do the waiting, not even by an override', () => {
    const floor = new WorkingFloor().milled();
    expect(floor.refusal(move('SLICE'))).toMatchObject({
      code: 'HOLD_AHEAD',
      kind: 'CLAMPED',
      beforeName: 'glue-up',
    });
    expect(floor.code(move('SLICE', overriding))).toBe('HOLD_AHEAD');
    expect(floor.code(move('SHIPPED', overriding))).toBe('HOLD_AHEAD');
  });

  it('ALREADY_THERE, NOT_ON_ROUTE: knows where a batch is and which stages its route has', () => {
    const floor = new WorkingFloor();
    expect(floor.code(move('BLANK'))).toBe('ALREADY_THERE');
    const short = { id: 'r', steps: aRoute().steps.filter((each) => each.stage !== 'SURFACE') };
    expect(new WorkingFloor([aBatch({ route: short })]).code(move('SURFACE'))).toBe('NOT_ON_ROUTE');
  });
});

describe('moving back', () => {
  it('REASON_MISSING: is rework, wants a reason and puts the steps back', () => {
    const floor = new WorkingFloor().milled();
    floor.give(start('glue-1', [1]));
    expect(floor.refusal(move('BLANK'), HELPER)).toEqual({
      code: 'REASON_MISSING',
      what: 'REWORK',
    });
    expect(floor.code(move('BLANK', { reason: ' ab ' }), HELPER)).toBe('REASON_MISSING');
    expect(floor.code(move('BLANK', { reason: 'x'.repeat(501) }), HELPER)).toBe('REASON_MISSING');
    floor.give(move('BLANK', { reason }), HELPER);
    expect(floor.first.runs).toEqual([]);
    expect(floor.first.occupations.every((o) => o.until !== null)).toBe(true);
    expect(placeOf(floor.first, floor.now)).toBe('BLANK');
  });

  it('keeps the stages before', () => {
    const floor = new WorkingFloor([doneBefore(aBatch(), 'sand-80', NOW - hours(30))]);
    floor.give(move('SLICE', { reason }));
    expect(placeOf(floor.first, floor.now)).toBe('SLICE');
    expect(floor.first.runs.map((run) => run.step)).not.toContain('flatten-1');
    expect(floor.first.runs.filter((run) => run.step === 'unclamp-1')).toHaveLength(2);
  });

  it('to the queue takes it off the floor', () => {
    const floor = new WorkingFloor().milled();
    floor.give(move('QUEUED', { reason }));
    expect(floor.first.releasedAt).toBeNull();
    expect(placeOf(floor.first, floor.now)).toBe('QUEUED');
  });

  it('HOLD_RUNNING: does not free wood with uncured glue for the machines before', () => {
    const floor = new WorkingFloor().milled().glued();
    expect(floor.refusal(move('BLANK', { reason }), HELPER)).toMatchObject({
      code: 'HOLD_RUNNING',
      kind: 'CLAMPED',
    });
    expect(floor.code(move('BLANK', { reason, ...overriding }), HELPER)).toBe('FORBIDDEN');
    const changes = floor.give(move('BLANK', overriding), OWNER);
    expect(changes.cut.map((cut) => `${cut.kind} ${cut.piece}`).sort()).toEqual([
      'CLAMPED 1',
      'CLAMPED 2',
      'CURE 1',
      'CURE 2',
    ]);
    expect(placeOf(floor.first, floor.now)).toBe('BLANK');
    expect(cardOf(floor.first, floor.now).marked).toBe(true);
  });

  it('HOLD_RUNNING: does not free wet oil for the sanding bench', () => {
    const floor = new WorkingFloor([doneBefore(aBatch(), 'oil-1', NOW - hours(48))]);
    floor.give(start('oil-1'));
    floor.give(finish('oil-1'));
    expect(floor.code(move('SAND', { reason }), HELPER)).toBe('HOLD_RUNNING');
    expect(floor.code(move('SAND', { reason }), MAKER)).toBe('HOLD_RUNNING');
    floor.wait(hours(1));
    expect(floor.code(move('SAND', { reason }), HELPER)).toBe('OK');
  });

  it('is undone to what it was, clamps and all', () => {
    const floor = new WorkingFloor().milled().glued();
    const before = floor.first;
    floor.give(move('BLANK', overriding));
    floor.wait(minutes(9));
    expect(floor.undo()).toBe('OK');
    expect(floor.first.runs).toEqual(before.runs);
    expect(floor.first.occupations).toEqual(before.occupations);
    // What was overridden stays written down.
    expect(floor.first.overrides).toHaveLength(4);
  });

  it('is not undone once somebody else has the clamps', () => {
    const shop = {
      ...new WorkingFloor().shop,
      clamps: [{ key: 'c', length: 10n ** 9n, count: 8 }],
    };
    const other = aBatch({ id: 'batch-2', code: 'CT-002' });
    const floor = new WorkingFloor([aBatch(), doneBefore(other, 'glue-1', NOW - hours(1))], shop);
    floor.milled().glued();
    floor.give(move('BLANK', overriding));
    floor.give(start('glue-1', [1]), MAKER, floor.second);
    expect(floor.undo()).toBe('UNDO_BUILT_ON');
  });
});

describe('an override', () => {
  it('FORBIDDEN, CAUTION_FIRST, REASON_MISSING: a maker, after the caution, with a reason', () => {
    const floor = new WorkingFloor().milled().glued();
    const ask = (more: object) => move('SLICE', { override: { ...overriding.override, ...more } });
    expect(floor.refusal(ask({}), HELPER)).toEqual({ code: 'FORBIDDEN', what: 'OVERRIDE' });
    expect(floor.refusal(ask({ cautionRead: false }))).toEqual({
      code: 'CAUTION_FIRST',
      caution: 'UNCURED_GLUE',
    });
    for (const text of ['', '  ', ' a ', 'x'.repeat(501)]) {
      expect(floor.refusal(ask({ reason: text }))).toEqual({
        code: 'REASON_MISSING',
        what: 'OVERRIDE',
      });
    }
    const changes = floor.give(ask({}), OWNER);
    expect(changes.cut).toHaveLength(4);
    expect(placeOf(floor.first, floor.now)).toBe('SLICE');
    expect(floor.first.occupations.every((o) => o.until === floor.now || !o.isClamps)).toBe(true);
  });

  it('guards food contact where oil soaks', () => {
    const floor = new WorkingFloor([doneBefore(aBatch(), 'oil-1', NOW - hours(48))]);
    floor.give(start('oil-1'));
    floor.give(finish('oil-1'));
    const override = { reason: 'no time', cautionRead: false };
    expect(floor.refusal(start('wipe-1', [0], { override }))).toEqual({
      code: 'CAUTION_FIRST',
      caution: 'FOOD_CONTACT',
    });
  });

  it('cuts only the holds of the pieces that are started, and marks the boards until the final check', () => {
    const floor = new WorkingFloor().milled().glued().unclamped();
    expect(cardOf(floor.first, floor.now).marked).toBe(false);
    const { cut } = floor.give(start('flatten-1', [2], overriding));
    expect(cut).toEqual([{ step: 'cure-1', piece: 2, kind: 'CURE' }]);
    expect(cardOf(floor.first, floor.now).holds.map((hold) => hold.piece)).toEqual([1]);
    expect(floor.code(start('flatten-1', [1]))).toBe('HOLD_RUNNING');
    expect(cardOf(floor.first, floor.now).marked).toBe(true);
    floor.wait(minutes(1));
    const checked = doneBefore(floor.first, 'final-check', floor.now);
    expect(cardOf(checked, floor.now).marked).toBe(true);
    const later = new WorkingFloor([checked]);
    later.now = floor.now + hours(24);
    later.give(start('final-check'));
    later.give(finish('final-check'));
    expect(cardOf(later.first, later.now).marked).toBe(false);
    expect(later.first.overrides).toHaveLength(1);
  });

  it('NOTHING_TO_OVERRIDE: is refused where no hold runs', () => {
    const floor = new WorkingFloor();
    expect(floor.code(start('mill', [0], overriding))).toBe('NOTHING_TO_OVERRIDE');
    expect(floor.code(finish('mill', [0], overriding))).toBe('NOTHING_TO_OVERRIDE');
    expect(floor.code(move('FIRST_GLUE_UP', overriding))).toBe('NOTHING_TO_OVERRIDE');
    floor.milled();
    expect(floor.code(move('BLANK', overriding))).toBe('NOTHING_TO_OVERRIDE');
  });

  it('STEP_BEFORE: does not stand in for work', () => {
    const floor = new WorkingFloor().milled().glued();
    expect(floor.refusal(start('flatten-1', [1], overriding))).toMatchObject({
      code: 'STEP_BEFORE',
      beforeName: 'taking clamps off',
    });
  });
});
