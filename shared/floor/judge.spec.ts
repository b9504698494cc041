import { describe, expect, it } from 'vitest';
import {
  aBatch,
  aRoute,
  aShop,
  HELPER,
  hours,
  MAKER,
  minutes,
  NOW,
  OFFICE,
  OWNER,
} from '#test/factories/floor';
import { DEFAULT_FINISHES, DEFAULT_GLUES } from '#shared/route/default-profiles';
import type { Place } from '#shared/route/route';
import { applyChanges } from './apply';
import { judge } from './judge';
import type { Actor, FloorBatch, FloorCommand, FloorShop } from './model';
import { placeOf } from './progress';
import type { RefusalCode } from './refusal';
import { judgeUndo } from './undo';

/** A shop in which commands are given one after another. */
class Floor {
  now = NOW;
  constructor(
    public batches: FloorBatch[] = [aBatch()],
    private readonly shop: FloorShop = aShop(),
  ) {}

  get first(): FloorBatch {
    return this.batches[0] as FloorBatch;
  }

  try(command: FloorCommand, actor: Actor = MAKER, batch = this.first) {
    return judge({ shop: this.shop, batches: this.batches, now: this.now }, batch, command, actor);
  }

  give(command: FloorCommand, actor: Actor = MAKER, batch = this.first) {
    const verdict = this.try(command, actor, batch);
    if (!verdict.ok) throw new Error(`Refused: ${JSON.stringify(verdict.refusal)}`);
    const after = applyChanges(batch, verdict.changes);
    this.batches = this.batches.map((other) => (other.id === batch.id ? after : other));
    return verdict.changes;
  }

  code(command: FloorCommand, actor: Actor = MAKER, batch = this.first): RefusalCode | 'OK' {
    const verdict = this.try(command, actor, batch);
    return verdict.ok ? 'OK' : verdict.refusal.code;
  }

  /** Blank done, at now. */
  milled(): this {
    this.give(move('FIRST_GLUE_UP'));
    return this;
  }

  /** Panels glued and clamped from now on. */
  glued(pieces = [1, 2]): this {
    this.give(start('glue-1', pieces));
    this.now += minutes(25);
    this.give(finish('glue-1', pieces));
    return this;
  }
}

const step = (
  kind: 'START' | 'FINISH',
  key: string,
  pieces: number[],
  more: Partial<Extract<FloorCommand, { kind: 'START' | 'FINISH' }>> = {},
): FloorCommand => ({ kind, step: key, pieces, happenedAt: null, override: null, ...more });
const start = (key: string, pieces = [0], more = {}) => step('START', key, pieces, more);
const finish = (key: string, pieces = [0], more = {}) => step('FINISH', key, pieces, more);
const move = (
  to: Place,
  more: Partial<Extract<FloorCommand, { kind: 'MOVE' }>> = {},
): FloorCommand => ({
  kind: 'MOVE',
  to,
  reason: null,
  happenedAt: null,
  override: null,
  ...more,
});
const override = { reason: 'the customer waits at the door', cautionRead: true };

describe('starting and finishing', () => {
  it('goes through the blank stage', () => {
    const floor = new Floor([aBatch({ releasedAt: null })]);
    expect(placeOf(floor.first, NOW)).toBe('QUEUED');
    floor.give(start('mill'), HELPER);
    expect(placeOf(floor.first, NOW)).toBe('BLANK');
    expect(floor.first.occupations).toMatchObject([{ resource: 'planer', until: null }]);
    floor.now += minutes(40);
    floor.give(finish('mill'), HELPER);
    expect(floor.first.occupations).toMatchObject([{ resource: 'planer', until: floor.now }]);
    floor.give(start('rip'));
    floor.give(finish('rip'));
    expect(placeOf(floor.first, floor.now)).toBe('FIRST_GLUE_UP');
  });

  it('refuses work whose earlier work is not done', () => {
    expect(new Floor().code(start('rip'))).toBe('STEP_BEFORE');
    expect(new Floor().code(start('glue-1', [1]))).toBe('STEP_BEFORE');
  });

  it('refuses steps and pieces that are not there', () => {
    const floor = new Floor().milled();
    expect(floor.code(start('polish'))).toBe('STEP_UNKNOWN');
    expect(floor.code(start('clamped-1', [1]))).toBe('STEP_UNKNOWN');
    expect(floor.code(start('glue-1', [3]))).toBe('PIECE_UNKNOWN');
    expect(floor.code(start('glue-1', [0]))).toBe('PIECE_UNKNOWN');
    expect(floor.code(start('glue-1', []))).toBe('PIECES_EMPTY');
  });

  it('refuses to start twice, to finish what was not started, and to finish twice', () => {
    const floor = new Floor();
    expect(floor.code(finish('mill'))).toBe('NOT_STARTED');
    floor.give(start('mill'));
    expect(floor.code(start('mill'))).toBe('ALREADY_STARTED');
    floor.give(finish('mill'));
    expect(floor.code(finish('mill'))).toBe('ALREADY_FINISHED');
    expect(floor.code(start('mill'))).toBe('ALREADY_FINISHED');
  });

  it('lets the office move nothing', () => {
    expect(new Floor().code(start('mill'), OFFICE)).toBe('FORBIDDEN');
    expect(new Floor().code(move('SLICE'), OFFICE)).toBe('FORBIDDEN');
  });

  it('refuses a full station and names who frees it first', () => {
    const other = aBatch({ id: 'batch-2', code: 'CT-002' });
    const floor = new Floor([aBatch(), other]);
    floor.give(start('mill'));
    const verdict = floor.try(start('mill'), MAKER, other);
    expect(verdict).toMatchObject({
      ok: false,
      refusal: {
        code: 'STATION_FULL',
        station: 'planer',
        holder: { batchCode: 'CT-001', freeAt: NOW + minutes(15 + 4 * 6) },
      },
    });
  });
});

describe('holds', () => {
  it('keep a piece from its next work until they clear', () => {
    const floor = new Floor().milled().glued();
    const cleared = floor.now + minutes(60);
    const verdict = floor.try(start('unclamp-1', [2]));
    expect(verdict).toMatchObject({
      refusal: { code: 'HOLD_RUNNING', kind: 'CLAMPED', piece: 2, clearAt: cleared },
    });
    floor.now = cleared - 1;
    expect(floor.code(start('unclamp-1', [2]))).toBe('HOLD_RUNNING');
    floor.now = cleared;
    expect(floor.code(start('unclamp-1', [2]))).toBe('OK');
  });

  it('keep a batch from the next stage until the glue has cured', () => {
    const floor = new Floor().milled().glued();
    floor.now += minutes(60);
    floor.give(start('unclamp-1', [1, 2]));
    floor.give(finish('unclamp-1', [1, 2]));
    expect(floor.code(move('SLICE'))).toBe('HOLD_RUNNING');
    expect(placeOf(floor.first, floor.now)).toBe('FIRST_GLUE_UP');
    floor.now += hours(11);
    expect(placeOf(floor.first, floor.now)).toBe('SLICE');
  });

  it('cannot be done by moving past them: the waiting is not done', () => {
    const floor = new Floor().milled();
    expect(floor.code(move('SLICE'))).toBe('HOLD_AHEAD');
    expect(floor.code(move('SLICE', { override }))).toBe('HOLD_AHEAD');
  });

  it('may be overridden by a maker with a reason, after the caution', () => {
    const floor = new Floor().milled().glued();
    expect(floor.code(move('SLICE', { override }), HELPER)).toBe('FORBIDDEN');
    const unread = { ...override, cautionRead: false };
    expect(floor.code(move('SLICE', { override: unread }))).toBe('CAUTION_FIRST');
    const mute = { ...override, reason: '  ' };
    expect(floor.code(move('SLICE', { override: mute }))).toBe('REASON_MISSING');
    const changes = floor.give(move('SLICE', { override }), OWNER);
    expect(changes.cut.map((cut) => cut.kind).sort()).toEqual([
      'CLAMPED',
      'CLAMPED',
      'CURE',
      'CURE',
    ]);
    expect(placeOf(floor.first, floor.now)).toBe('SLICE');
  });

  it('are not there to be overridden when none runs', () => {
    expect(new Floor().code(start('mill', [0], { override }))).toBe('NOTHING_TO_OVERRIDE');
    expect(new Floor().code(move('FIRST_GLUE_UP', { override }))).toBe('NOTHING_TO_OVERRIDE');
  });
});

describe('clamps', () => {
  it('are taken from spreading until somebody has taken them off, through the night', () => {
    const floor = new Floor().milled().glued();
    floor.now += hours(14);
    expect(floor.first.occupations.filter((o) => o.isClamps && o.until === null)).toHaveLength(2);
    floor.give(start('unclamp-1', [1]));
    floor.give(finish('unclamp-1', [1]));
    const open = floor.first.occupations.filter((o) => o.isClamps && o.until === null);
    expect(open).toMatchObject([{ piece: 2, amount: 4 }]);
  });

  it('are refused when too few are free, and longer ones stand in', () => {
    const clamps = [
      { key: 'short', length: 200_000_000n, count: 20 },
      { key: 'long', length: 600_000_000n, count: 3 },
      { key: 'longer', length: 900_000_000n, count: 4 },
    ];
    const floor = new Floor([aBatch()], aShop({ clamps })).milled();
    expect(floor.code(start('glue-1', [1, 2]))).toBe('CLAMPS_FULL');
    const { taken } = floor.give(start('glue-1', [1]));
    expect(taken.filter((o) => o.isClamps)).toMatchObject([
      { resource: 'long', amount: 3 },
      { resource: 'longer', amount: 1 },
    ]);
    expect(floor.try(start('glue-1', [2]))).toMatchObject({
      refusal: { code: 'CLAMPS_FULL', need: 4, free: 3, owned: 7, holder: { batchCode: 'CT-001' } },
    });
  });
});

describe('the oil rack', () => {
  it('is taken by boards until they are wiped', () => {
    const stations = aShop().stations.map((station) =>
      station.key === 'oil-rack' ? { ...station, capacity: 6 } : station,
    );
    const done = aBatch().route.steps.findIndex((each) => each.stage === 'FINISH');
    const long = NOW - hours(48);
    const before = (batch: FloorBatch): FloorBatch => ({
      ...batch,
      runs: batch.route.steps.slice(0, done).flatMap((each) =>
        each.kind === 'WAIT'
          ? []
          : (each.scope === 'BATCH' ? [0] : each.scope === 'PANEL' ? [1, 2] : [1, 2, 3, 4]).map(
              (piece) => ({
                step: each.key,
                piece,
                startedAt: long,
                startedBy: 'maker',
                finishedAt: long,
                finishedBy: 'maker',
                cutAt: null,
                cutBy: null,
              }),
            ),
      ),
    });
    const other = before(aBatch({ id: 'batch-2', code: 'CT-002' }));
    const floor = new Floor([before(aBatch()), other], aShop({ stations }));
    floor.give(start('oil-1'));
    floor.give(finish('oil-1'));
    expect(floor.code(start('oil-1'), MAKER, other)).toBe('STATION_FULL');
    expect(floor.code(start('wipe-1'))).toBe('HOLD_RUNNING');
    floor.now += minutes(60);
    floor.give(start('wipe-1'));
    floor.give(finish('wipe-1'));
    expect(floor.code(start('oil-1'), MAKER, other)).toBe('OK');
    expect(floor.code(start('oil-2'))).toBe('HOLD_RUNNING');
    floor.now += hours(24);
    expect(floor.code(start('oil-2'))).toBe('OK');
  });
});

describe('moving', () => {
  it('forward finishes the steps in between, and gives back what they held', () => {
    const floor = new Floor();
    floor.give(start('mill'));
    floor.now += minutes(5);
    floor.give(move('FIRST_GLUE_UP'), HELPER);
    expect(floor.first.runs.map((run) => [run.step, run.finishedAt])).toEqual([
      ['mill', floor.now],
      ['rip', floor.now],
    ]);
    expect(floor.first.occupations).toMatchObject([{ resource: 'planer', until: floor.now }]);
  });

  it('back is rework: it wants a reason and puts the steps back', () => {
    const floor = new Floor().milled().glued();
    expect(floor.code(move('BLANK'))).toBe('REASON_MISSING');
    floor.give(move('BLANK', { reason: 'a strip was cupped' }));
    expect(floor.first.runs).toEqual([]);
    expect(floor.first.occupations.every((o) => o.until !== null)).toBe(true);
    expect(placeOf(floor.first, floor.now)).toBe('BLANK');
  });

  it('knows where a batch is, which stages its route has, and what has shipped', () => {
    const floor = new Floor();
    expect(floor.code(move('BLANK'))).toBe('ALREADY_THERE');
    const short = { id: 'r', steps: aRoute().steps.filter((each) => each.stage !== 'SURFACE') };
    expect(new Floor([aBatch({ route: short })]).code(move('SURFACE'))).toBe('NOT_ON_ROUTE');
    const gone = new Floor([aBatch({ shippedAt: NOW - 1 })]);
    expect(gone.code(move('SAND', { reason: 'came back' }))).toBe('SHIPPED_STAYS');
    expect(gone.code(start('mill'))).toBe('BATCH_GONE');
    expect(gone.code(finish('mill'))).toBe('BATCH_GONE');
  });
});

describe('saying when it happened', () => {
  it('a helper may go back two hours, a maker further, nobody into the future', () => {
    const floor = new Floor();
    const ago = (n: number) => start('mill', [0], { happenedAt: NOW - minutes(n) });
    expect(floor.code(ago(120), HELPER)).toBe('OK');
    expect(floor.code(ago(121), HELPER)).toBe('TOO_LONG_AGO');
    expect(floor.code(ago(121), MAKER)).toBe('OK');
    expect(floor.code(ago(-1), MAKER)).toBe('IN_THE_FUTURE');
    expect(floor.code(ago(Number.NaN), MAKER)).toBe('IN_THE_FUTURE');
  });

  it('not before the fact before', () => {
    const floor = new Floor();
    floor.give(start('mill', [0], { happenedAt: NOW - minutes(30) }));
    expect(floor.code(finish('mill', [0], { happenedAt: NOW - minutes(31) }))).toBe(
      'BEFORE_THE_FACT_BEFORE',
    );
    floor.give(finish('mill', [0], { happenedAt: NOW - minutes(10) }));
    expect(floor.code(start('rip', [0], { happenedAt: NOW - minutes(11) }))).toBe(
      'BEFORE_THE_FACT_BEFORE',
    );
  });

  it('holds count from when it happened', () => {
    const floor = new Floor().milled();
    floor.now += hours(3);
    floor.give(start('glue-1', [1], { happenedAt: floor.now - minutes(100) }));
    floor.give(finish('glue-1', [1], { happenedAt: floor.now - minutes(60) }));
    expect(floor.code(start('unclamp-1', [1]))).toBe('OK');
  });
});

describe('undo', () => {
  const view = (floor: Floor) => ({ shop: aShop(), batches: floor.batches, now: floor.now });

  it('restores what was, for the one who did it or a maker, for ten minutes', () => {
    const floor = new Floor();
    const before = floor.first;
    const changes = floor.give(start('mill'), HELPER);
    const command = { by: HELPER.memberId, recordedAt: floor.now, changes, isLatest: true };
    const other: Actor = { memberId: 'helper-2', roles: ['HELPER'] };
    expect(judgeUndo(view(floor), floor.first, command, other)).toMatchObject({
      refusal: { code: 'FORBIDDEN', what: 'UNDO' },
    });
    const verdict = judgeUndo(view(floor), floor.first, command, MAKER);
    if (!verdict.ok) throw new Error('refused');
    const after = applyChanges(floor.first, verdict.changes);
    expect(after.runs).toEqual(before.runs);
    expect(after.occupations.filter((o) => o.until === null)).toEqual([]);
    floor.now += minutes(10) + 1;
    expect(judgeUndo(view(floor), floor.first, command, HELPER)).toMatchObject({
      refusal: { code: 'UNDO_TOO_LATE' },
    });
  });

  it('is refused when something was built on it', () => {
    const second = aBatch({ id: 'batch-2', code: 'CT-002' });
    const floor = new Floor([aBatch(), second]);
    floor.give(start('mill'));
    const changes = floor.give(finish('mill'));
    const command = { by: MAKER.memberId, recordedAt: floor.now, changes, isLatest: true };
    expect(
      judgeUndo(view(floor), floor.first, { ...command, isLatest: false }, MAKER),
    ).toMatchObject({ refusal: { code: 'UNDO_BUILT_ON' } });
    floor.now += minutes(1);
    floor.give(start('mill'), MAKER, second);
    expect(judgeUndo(view(floor), floor.first, command, MAKER)).toMatchObject({
      refusal: { code: 'UNDO_BUILT_ON' },
    });
  });
});

describe('other glues and finishes', () => {
  it('a hardening oil must be wiped in time and cures in full before the final check', () => {
    const route = aRoute(DEFAULT_GLUES[1], DEFAULT_FINISHES[1]);
    const keys = route.steps.filter((each) => each.stage === 'FINISH').map((each) => each.key);
    expect(keys).toEqual([
      'oil-1',
      'soak-1',
      'wipe-1',
      'dwell-1',
      'oil-2',
      'soak-2',
      'wipe-2',
      'finish-cure',
      'final-check',
    ]);
    expect(route.steps.find((each) => each.key === 'finish-cure')).toMatchObject({
      after: 'wipe-2',
      minMinutes: 14 * 24 * 60,
    });
    expect(route.steps.find((each) => each.key === 'soak-1')).toMatchObject({ maxMinutes: 45 });
  });
});
