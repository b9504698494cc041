import { describe, expect, it } from 'vitest';
import { aBatch, aRoute, HELPER, hours, minutes, NOW } from '#test/factories/floor';
import { doneBefore, finish, start, WorkingFloor } from '#test/factories/working-floor';
import { DEFAULT_FINISHES } from '#shared/route/default-profiles';
import { cardOf, pieceCounts, progressPercent } from './card';

const actionsOf = (floor: WorkingFloor) =>
  cardOf(floor.first, floor.now).actions.map(
    ({ kind, step, piece }) => `${kind} ${step.key}/${piece}`,
  );

describe('the shelf of a card', () => {
  it('is ready, working, holding as the pieces go along', () => {
    const floor = new WorkingFloor();
    const shelf = () => cardOf(floor.first, floor.now).shelf;
    expect(shelf()).toBe('READY');
    floor.give(start('mill'));
    expect(shelf()).toBe('WORKING');
    floor.give(finish('mill'));
    floor.milled().glued([1]);
    // One panel is in the clamps, the other can be glued.
    expect(shelf()).toBe('READY');
    floor.glued([2]);
    expect(shelf()).toBe('HOLDING');
    floor.wait(hours(1));
    expect(shelf()).toBe('READY');
    floor.give(start('unclamp-1', [1, 2]));
    expect(shelf()).toBe('WORKING');
    floor.give(finish('unclamp-1', [1, 2]));
    expect(shelf()).toBe('HOLDING');
    floor.wait(hours(11));
    expect(cardOf(floor.first, floor.now)).toMatchObject({ place: 'SLICE', shelf: 'READY' });
  });

  it('is holding through the full cure of a hardening oil', () => {
    const route = aRoute(undefined, DEFAULT_FINISHES[1]);
    const wiped = doneBefore(aBatch({ route }), 'final-check', NOW);
    expect(cardOf(wiped, NOW + hours(13 * 24))).toMatchObject({
      place: 'FINISH',
      shelf: 'HOLDING',
      actions: [],
    });
    expect(cardOf(wiped, NOW + hours(14 * 24)).shelf).toBe('READY');
  });
});

describe('the actions of a card', () => {
  it('are to finish first what is under way, then in the order of route and pieces', () => {
    const floor = new WorkingFloor([aBatch({ boards: 6 })]).milled();
    expect(actionsOf(floor)).toEqual(['START glue-1/1', 'START glue-1/2', 'START glue-1/3']);
    floor.glued([1, 2]).unclamped([1, 2]).wait(hours(11));
    floor.give(start('flatten-1', [2]));
    expect(actionsOf(floor)).toEqual(['FINISH flatten-1/2', 'START glue-1/3', 'START flatten-1/1']);
  });

  it('put what runs out soonest before what comes first', () => {
    const floor = new WorkingFloor([aBatch({ boards: 6 })]);
    floor.wait(-hours(30)).batches = [aBatch({ boards: 6, releasedAt: NOW - hours(40) })];
    floor.milled().glued([1, 2]).unclamped([1, 2]).wait(hours(11));
    floor.give(start('flatten-1', [2]));
    floor.give(finish('flatten-1', [2]));
    floor.give(start('slice', [2]));
    floor.give(finish('slice', [2]));
    const { actions } = cardOf(floor.first, floor.now);
    const ripped = NOW - hours(30);
    expect(actions.map(({ step, piece, latestAt }) => [step.key, piece, latestAt])).toEqual([
      ['glue-1', 3, ripped + hours(24)],
      ['glue-2', 3, floor.now + hours(24)],
      ['glue-2', 4, floor.now + hours(24)],
      ['flatten-1', 1, null],
    ]);
  });

  it('are none when all is done or gone', () => {
    const floor = new WorkingFloor([doneBefore(aBatch(), 'final-check', NOW - hours(1))]);
    floor.wait(hours(24)).give(start('final-check'));
    floor.give(finish('final-check'));
    expect(cardOf(floor.first, floor.now)).toMatchObject({ place: 'READY', actions: [] });
    const gone = aBatch({ shippedAt: NOW });
    expect(cardOf(gone, NOW)).toMatchObject({ place: 'SHIPPED', actions: [] });
  });
});

describe('the people of a card', () => {
  it('are those at work on it, else the one it is given to', () => {
    const floor = new WorkingFloor();
    floor.give({ kind: 'ASSIGN', memberId: 'maker' });
    expect(cardOf(floor.first, floor.now).people).toEqual(['maker']);
    floor.give(start('mill'), HELPER);
    expect(cardOf(floor.first, floor.now).people).toEqual(['helper']);
  });
});

describe('the count of pieces', () => {
  it('says how many are in which state', () => {
    const floor = new WorkingFloor([aBatch({ boards: 8 })]).milled();
    expect(pieceCounts(floor.first, floor.now)).toEqual([
      { count: 4, state: { kind: 'TODO', verb: 'glue' } },
    ]);
    floor.glued([1, 2]).unclamped([1, 2]);
    floor.glued([3]);
    floor.give(start('glue-1', [4]));
    expect(pieceCounts(floor.first, floor.now)).toEqual([
      { count: 2, state: { kind: 'HOLD', hold: 'CURE' } },
      { count: 1, state: { kind: 'HOLD', hold: 'CLAMPED' } },
      { count: 1, state: { kind: 'WORKING', name: 'glue-up' } },
    ]);
  });

  it('is empty where the batch is one piece', () => {
    expect(pieceCounts(aBatch(), NOW)).toEqual([]);
  });
});

describe('progress', () => {
  it('is 0 at first, 100 only when all is done, and never goes back', () => {
    const batch = aBatch();
    let before = 0;
    for (const step of batch.route.steps) {
      const percent = progressPercent(doneBefore(batch, step.key, NOW), NOW + hours(48));
      expect(percent).toBeGreaterThanOrEqual(before);
      expect(percent).toBeLessThan(100);
      before = percent;
    }
    expect(progressPercent(batch, NOW)).toBe(0);
    const floor = new WorkingFloor([doneBefore(batch, 'final-check', NOW)]).wait(hours(24));
    floor.give(start('final-check'));
    floor.wait(minutes(20)).give(finish('final-check'));
    expect(progressPercent(floor.first, floor.now)).toBe(100);
  });
});
