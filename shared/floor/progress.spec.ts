import { describe, expect, it } from 'vitest';
import { aBatch, aRoute, hours, minutes, NOW } from '#test/factories/floor';
import {
  doneBefore,
  finish,
  move,
  overriding,
  start,
  WorkingFloor,
} from '#test/factories/working-floor';
import { DEFAULT_FINISHES } from '#shared/route/default-profiles';
import { holdsOf, limitsOf, placeOf, startableSteps } from './progress';

describe('the place of a batch', () => {
  it('is the stage of the work that comes next, once the waits before it are over', () => {
    const batch = aBatch();
    const work = batch.route.steps.filter((step) => step.kind === 'WORK');
    const waited = work.map((step) => placeOf(doneBefore(batch, step.key, NOW - hours(48)), NOW));
    expect(waited).toEqual(work.map((step) => step.stage));
    // Before they are over it stands in the stage of the wait.
    const glued = doneBefore(batch, 'flatten-1', NOW);
    expect(placeOf(glued, NOW)).toBe('FIRST_GLUE_UP');
    expect(placeOf(doneBefore(batch, 'oil-2', NOW), NOW + hours(23))).toBe('FINISH');
  });

  it('is the stage of its least advanced piece', () => {
    const floor = new WorkingFloor().milled().glued([1]).unclamped([1]).wait(hours(11));
    floor.give(start('flatten-1', [1]));
    expect(placeOf(floor.first, floor.now)).toBe('FIRST_GLUE_UP');
    floor.give(finish('flatten-1', [1]));
    floor.glued([2]).unclamped([2]).wait(hours(11));
    expect(placeOf(floor.first, floor.now)).toBe('SLICE');
  });

  it('is queued before it is let onto the floor, and ready when nothing is left', () => {
    expect(placeOf(aBatch({ releasedAt: null }), NOW)).toBe('QUEUED');
    const done = doneBefore(aBatch(), 'final-check', NOW - hours(1));
    const floor = new WorkingFloor([done]).wait(hours(24));
    floor.give(start('final-check'));
    floor.give(finish('final-check'));
    expect(placeOf(floor.first, floor.now)).toBe('READY');
  });

  it('moves on by itself when a wait clears', () => {
    const floor = new WorkingFloor().milled().glued().unclamped();
    const [first] = holdsOf(floor.first, floor.now);
    if (!first) throw new Error('The glue cures.');
    expect(placeOf(floor.first, first.clearAt - 1)).toBe('FIRST_GLUE_UP');
    expect(placeOf(floor.first, first.clearAt)).toBe('SLICE');
  });
});

describe('holds', () => {
  it('run for each piece from when its own work was finished, the first to clear first', () => {
    const floor = new WorkingFloor().milled().glued([2]);
    const second = floor.now;
    floor.glued([1]);
    const first = floor.now;
    expect(
      holdsOf(floor.first, floor.now).map((hold) => [hold.kind, hold.piece, hold.clearAt]),
    ).toEqual([
      ['CLAMPED', 2, second + hours(1)],
      ['CLAMPED', 1, first + hours(1)],
      ['CURE', 2, second + hours(12)],
      ['CURE', 1, first + hours(12)],
    ]);
    expect(holdsOf(floor.first, second + hours(1)).map((hold) => hold.kind)).not.toContain('DWELL');
    expect(holdsOf(floor.first, first + hours(12))).toEqual([]);
  });

  it('that were cut are over', () => {
    const floor = new WorkingFloor().milled().glued([1, 2]);
    floor.give(move('SLICE', overriding));
    expect(holdsOf(floor.first, floor.now)).toEqual([]);
  });
});

describe('limits', () => {
  it('for the second glue-up run from flattening the first of its panels', () => {
    const needs = { ...aBatch().needs, panelCount: 2, panelBoards: 4 };
    const cured = doneBefore(aBatch({ needs }), 'flatten-1', NOW - hours(20));
    const floor = new WorkingFloor([cured]);
    for (const panel of [1, 2]) {
      floor.give(start('flatten-1', [panel]));
      floor.wait(minutes(30)).give(finish('flatten-1', [panel]));
    }
    floor.wait(hours(30));
    for (const kind of [start, finish]) floor.give(kind('slice', [1, 2]));
    const limits = limitsOf(floor.first);
    expect(limits.map((limit) => [limit.kind, limit.piece])).toEqual(
      [1, 2, 3, 4].map((block) => ['FRESHNESS', block]),
    );
    const latest = NOW + minutes(30) + hours(24);
    expect(limits.every((limit) => limit.latestAt === latest)).toBe(true);
    // A maximum that was missed blocks nothing.
    expect(floor.now).toBeGreaterThan(latest);
    expect(floor.code(start('glue-2', [1]))).toBe('OK');
    floor.give(start('glue-2', [1]));
    expect(limitsOf(floor.first).map((limit) => limit.piece)).toEqual([2, 3, 4]);
  });

  it('for the first glue-up run from ripping', () => {
    const floor = new WorkingFloor().milled();
    expect(limitsOf(floor.first)).toMatchObject([
      { kind: 'FRESHNESS', piece: 1, since: NOW, clearAt: NOW, latestAt: NOW + hours(24) },
      { kind: 'FRESHNESS', piece: 2 },
    ]);
    expect(holdsOf(floor.first, NOW)).toEqual([]);
  });

  it('for wiping run from oiling, with a hardening oil', () => {
    const route = aRoute(undefined, DEFAULT_FINISHES[1]);
    const floor = new WorkingFloor([doneBefore(aBatch({ route }), 'oil-1', NOW - hours(48))]);
    floor.give(start('oil-1'));
    floor.give(finish('oil-1'));
    expect(limitsOf(floor.first)).toMatchObject([
      { kind: 'SOAK', clearAt: NOW + minutes(20), latestAt: NOW + minutes(45) },
    ]);
    floor.wait(minutes(30)).give(start('wipe-1'));
    expect(limitsOf(floor.first)).toEqual([]);
  });

  it('are none for an oil that does not set', () => {
    const floor = new WorkingFloor([doneBefore(aBatch(), 'oil-1', NOW - hours(48))]);
    floor.give(start('oil-1'));
    floor.give(finish('oil-1'));
    expect(limitsOf(floor.first)).toEqual([]);
  });
});

describe('what can be started', () => {
  it('is what the rules would let start, and nothing else', () => {
    const floor = new WorkingFloor().milled().glued([1]).unclamped([1]).wait(hours(11));
    floor.give(start('flatten-1', [1]));
    floor.give(finish('flatten-1', [1]));
    const startable = startableSteps(floor.first, floor.now);
    expect(startable.map(({ step, piece }) => `${step.key}/${piece}`)).toEqual([
      'glue-1/2',
      'slice/1',
    ]);
    for (const step of floor.first.route.steps) {
      if (step.kind !== 'WORK') continue;
      for (const piece of step.scope === 'BATCH' ? [0] : [1, 2]) {
        const isListed = startable.some((each) => each.step === step && each.piece === piece);
        expect(floor.code(start(step.key, [piece])) === 'OK', step.key).toBe(isListed);
      }
    }
  });
});
