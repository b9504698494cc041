import { describe, expect, it } from 'vitest';
import { aBatch, HELPER, hours, MAKER, minutes, NOW, OFFICE, OWNER } from '#test/factories/floor';
import { doneBefore, finish, move, start, WorkingFloor } from '#test/factories/working-floor';
import { placeOf } from './progress';

describe('starting and finishing', () => {
  it('goes through the blank stage', () => {
    const floor = new WorkingFloor([aBatch({ releasedAt: null })]);
    expect(placeOf(floor.first, NOW)).toBe('QUEUED');
    floor.give(start('mill'), HELPER);
    expect(floor.first.releasedAt).toBe(NOW);
    expect(placeOf(floor.first, NOW)).toBe('BLANK');
    expect(floor.first.occupations).toMatchObject([{ resource: 'planer', until: null }]);
    floor.wait(minutes(40));
    floor.give(finish('mill'), HELPER);
    expect(floor.first.occupations).toMatchObject([{ resource: 'planer', until: floor.now }]);
    floor.give(start('rip'));
    floor.give(finish('rip'));
    expect(placeOf(floor.first, floor.now)).toBe('FIRST_GLUE_UP');
  });

  it('STEP_BEFORE: refuses work whose earlier work is not done, and names it', () => {
    const floor = new WorkingFloor();
    expect(floor.refusal(start('rip'))).toMatchObject({
      code: 'STEP_BEFORE',
      stepName: 'ripping',
      beforeName: 'milling',
    });
    floor.milled().glued([1]).unclamped([1]).wait(hours(11));
    floor.give(start('flatten-1', [1]));
    expect(floor.refusal(start('slice', [1]))).toMatchObject({
      code: 'STEP_BEFORE',
      beforeName: 'flattening',
      piece: 1,
      pieceKind: 'PANEL',
    });
  });

  it('STEP_BEFORE: a block waits for every panel its slices come from, and for no other', () => {
    const floor = new WorkingFloor().milled().glued([1]).unclamped([1]).wait(hours(11));
    for (const key of ['flatten-1', 'slice']) {
      floor.give(start(key, [1]));
      floor.give(finish(key, [1]));
    }
    // Blocks 1 and 2 are of panel 1; panel 2 has not been glued.
    expect(floor.code(start('glue-2', [2]))).toBe('OK');
    expect(floor.refusal(start('glue-2', [3]))).toMatchObject({
      code: 'STEP_BEFORE',
      beforeName: 'glue-up',
      piece: 2,
      pieceKind: 'PANEL',
    });
    expect(placeOf(floor.first, floor.now)).toBe('FIRST_GLUE_UP');
  });

  it('STEP_UNKNOWN, PIECE_UNKNOWN, PIECES_EMPTY: refuses what is not there', () => {
    const floor = new WorkingFloor().milled();
    expect(floor.code(start('polish'))).toBe('STEP_UNKNOWN');
    expect(floor.refusal(start('x'.repeat(10_000)))).toEqual({
      code: 'STEP_UNKNOWN',
      step: 'x'.repeat(60),
    });
    expect(floor.code(start('clamped-1', [1]))).toBe('STEP_UNKNOWN');
    expect(floor.refusal(start('glue-1', [3]))).toEqual({
      code: 'PIECE_UNKNOWN',
      step: 'glue-up',
      piece: 3,
      pieces: 2,
    });
    for (const piece of [0, -1, 1.5, Number.NaN]) {
      expect(floor.code(start('glue-1', [piece]))).toBe('PIECE_UNKNOWN');
    }
    expect(floor.code(start('glue-1', []))).toBe('PIECES_EMPTY');
    expect(floor.code(finish('glue-1', []))).toBe('PIECES_EMPTY');
  });

  it('counts a piece once that is named twice', () => {
    const floor = new WorkingFloor().milled();
    expect(floor.give(start('glue-1', [1, 1])).runs).toHaveLength(1);
  });

  it('NOT_STARTED, ALREADY_STARTED, ALREADY_FINISHED: each fact once', () => {
    const floor = new WorkingFloor();
    expect(floor.code(finish('mill'))).toBe('NOT_STARTED');
    floor.give(start('mill'));
    expect(floor.code(start('mill'))).toBe('ALREADY_STARTED');
    floor.give(finish('mill'));
    expect(floor.code(finish('mill'))).toBe('ALREADY_FINISHED');
    expect(floor.code(start('mill'))).toBe('ALREADY_FINISHED');
  });

  it('does nothing at all when one of the pieces is refused', () => {
    const floor = new WorkingFloor().milled().glued([1]);
    expect(floor.refusal(start('glue-1', [1, 2]))).toMatchObject({
      code: 'ALREADY_FINISHED',
      piece: 1,
    });
  });

  it('FORBIDDEN: lets the office move nothing, and a helper all that the rules allow', () => {
    const floor = new WorkingFloor();
    for (const command of [
      start('mill'),
      move('SLICE'),
      { kind: 'ASSIGN', memberId: 'x' },
    ] as const) {
      expect(floor.refusal(command, OFFICE)).toEqual({ code: 'FORBIDDEN', what: 'MOVE' });
    }
    expect(floor.code(start('mill'), HELPER)).toBe('OK');
    const partner = { memberId: 'p', roles: ['OFFICE', 'HELPER'] } as const;
    expect(floor.code(start('mill'), partner)).toBe('OK');
  });

  it('gives a batch to somebody and takes it back', () => {
    const floor = new WorkingFloor();
    floor.give({ kind: 'ASSIGN', memberId: 'helper' }, HELPER);
    expect(floor.first.assignedTo).toBe('helper');
    expect(floor.undo(HELPER)).toBe('OK');
    expect(floor.first.assignedTo).toBeNull();
  });
});

describe('saying when it happened', () => {
  const ago = (n: number) => start('mill', [0], { happenedAt: NOW - minutes(n) });
  const released = (n: number) => new WorkingFloor([aBatch({ releasedAt: NOW - hours(n) })]);

  it('TOO_LONG_AGO, IN_THE_FUTURE: a helper goes back two hours, a maker further, nobody ahead', () => {
    const floor = released(24 * 40);
    expect(floor.code(ago(120), HELPER)).toBe('OK');
    expect(floor.refusal(ago(121), HELPER)).toEqual({ code: 'TOO_LONG_AGO', minutes: 120 });
    for (const person of [MAKER, OWNER]) {
      expect(floor.code(ago(121), person)).toBe('OK');
      expect(floor.code(ago(31 * 24 * 60), person)).toBe('OK');
      expect(floor.code(ago(31 * 24 * 60 + 1), person)).toBe('TOO_LONG_AGO');
      expect(floor.code(ago(-1), person)).toBe('IN_THE_FUTURE');
    }
    expect(floor.code(ago(Number.NaN), MAKER)).toBe('IN_THE_FUTURE');
    expect(floor.code(ago(Infinity), MAKER)).toBe('IN_THE_FUTURE');
  });

  it('takes a clock that runs a little ahead for now', () => {
    const floor = new WorkingFloor();
    floor.give(start('mill', [0], { happenedAt: NOW + 4_000 }), HELPER);
    expect(floor.first.runs[0]?.startedAt).toBe(NOW);
  });

  it('BEFORE_THE_FACT_BEFORE: not before the start, the work before, the hold or the release', () => {
    const floor = new WorkingFloor();
    const at = (n: number) => ({ happenedAt: floor.now - minutes(n) });
    expect(floor.refusal(start('mill', [0], at(61)))).toEqual({
      code: 'BEFORE_THE_FACT_BEFORE',
      earliest: NOW - hours(1),
    });
    expect(floor.code(move('FIRST_GLUE_UP', at(61)))).toBe('BEFORE_THE_FACT_BEFORE');
    floor.give(start('mill', [0], at(30)));
    expect(floor.code(finish('mill', [0], at(31)))).toBe('BEFORE_THE_FACT_BEFORE');
    expect(floor.code(move('FIRST_GLUE_UP', at(31)))).toBe('BEFORE_THE_FACT_BEFORE');
    floor.give(finish('mill', [0], at(10)));
    expect(floor.code(start('rip', [0], at(11)))).toBe('BEFORE_THE_FACT_BEFORE');
    floor.give(move('FIRST_GLUE_UP'));
    floor.glued();
    floor.wait(hours(2));
    // The clamped time is over now; it was not over then.
    const cleared = floor.now - hours(1);
    expect(floor.refusal(start('unclamp-1', [1], at(61)))).toEqual({
      code: 'BEFORE_THE_FACT_BEFORE',
      earliest: cleared,
    });
    expect(floor.code(start('unclamp-1', [1], at(60)))).toBe('OK');
    expect(floor.code(move('QUEUED', { ...at(121), reason: 'cupped' }))).toBe(
      'BEFORE_THE_FACT_BEFORE',
    );
  });

  it('BEFORE_THE_FACT_BEFORE: not while the same piece was under the same work before a rework', () => {
    const floor = new WorkingFloor();
    floor.give(start('mill'));
    floor.wait(minutes(20));
    floor.give(move('QUEUED', { reason: 'wrong wood' }));
    const reworked = floor.now;
    floor.wait(minutes(20));
    const early = { happenedAt: reworked - minutes(5) };
    expect(floor.refusal(start('mill', [0], early))).toEqual({
      code: 'BEFORE_THE_FACT_BEFORE',
      earliest: reworked,
    });
    expect(floor.code(start('mill', [0], { happenedAt: reworked }))).toBe('OK');
  });

  it('counts holds and clamps from when it happened', () => {
    const floor = new WorkingFloor().milled().wait(hours(3));
    const at = (n: number) => ({ happenedAt: floor.now - minutes(n) });
    const { taken } = floor.give(start('glue-1', [1], at(100)));
    expect(taken.every((o) => o.since === floor.now - minutes(100))).toBe(true);
    floor.give(finish('glue-1', [1], at(60)));
    expect(floor.code(start('unclamp-1', [1]))).toBe('OK');
  });

  it('a batch that has left the shop is done with', () => {
    const gone = new WorkingFloor([aBatch({ shippedAt: NOW - 1 })]);
    expect(gone.code(start('mill'))).toBe('BATCH_GONE');
    expect(gone.code(finish('mill'))).toBe('BATCH_GONE');
    expect(gone.code(move('SAND', { reason: 'came back' }))).toBe('SHIPPED_STAYS');
  });

  it('a batch ships when all is done', () => {
    const batch = doneBefore(aBatch(), 'final-check', NOW - hours(1));
    const floor = new WorkingFloor([batch]);
    expect(placeOf(floor.first, NOW + hours(24))).toBe('FINISH');
    floor.wait(hours(24)).give(start('final-check'), HELPER);
    floor.give(finish('final-check'), HELPER);
    expect(placeOf(floor.first, floor.now)).toBe('READY');
    floor.give(move('SHIPPED'), HELPER);
    expect(placeOf(floor.first, floor.now)).toBe('SHIPPED');
    expect(floor.undo(HELPER)).toBe('OK');
    expect(placeOf(floor.first, floor.now)).toBe('READY');
  });
});
