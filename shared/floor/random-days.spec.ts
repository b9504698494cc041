import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  aBatch,
  aShop,
  HELPER,
  hours,
  MAKER,
  minutes,
  NOW,
  OFFICE,
  OWNER,
} from '#test/factories/floor';
import { PLACES } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';
import { applyChanges } from './apply';
import { judge, type FloorView } from './judge';
import type { Actor, FloorBatch, FloorChangeSet, FloorCommand, Override } from './model';
import { panelCountOf, piecesOf, relatedPieces } from './pieces';
import { cardOf } from './card';
import { runOf, waitOn } from './progress';
import { judgeUndo } from './undo';

/*
 * Random days in a small shop: random people of random roles do random things, also late, and take some of them back.
 * Whatever the rules let pass must keep the shop's invariants.
 */

const deep = process.env['DEEP'] === '1';
const RUNS = deep ? 3_000 : 60;
const SEED = 20261201;

interface Recorded {
  batchId: string;
  by: Actor;
  at: Instant;
  changes: FloorChangeSet;
  undone: boolean;
}

const people: readonly Actor[] = [
  OWNER,
  MAKER,
  HELPER,
  OFFICE,
  { memberId: 'h2', roles: ['HELPER'] },
];
const steps = aBatch().route.steps.filter((step) => step.kind === 'WORK');

const gap = fc.oneof(
  fc.constant(0),
  fc.integer({ min: 1, max: 90 }).map(minutes),
  fc.integer({ min: 1, max: 30 }).map(hours),
);

const deed = fc.record({
  gap,
  who: fc.integer({ min: 0, max: people.length - 1 }),
  batch: fc.integer({ min: 0, max: 2 }),
  kind: fc.constantFrom(
    'NEXT',
    'NEXT',
    'NEXT',
    'NEXT',
    'START',
    'FINISH',
    'MOVE',
    'UNDO',
    'ASSIGN',
  ),
  step: fc.integer({ min: 0, max: steps.length - 1 }),
  pick: fc.nat({ max: 30 }),
  many: fc.integer({ min: 1, max: 4 }),
  to: fc.constantFrom(...PLACES),
  ago: fc.option(fc.integer({ min: -5, max: 400 }), { freq: 4 }),
  override: fc.option(
    fc.record({ reason: fc.constantFrom('', 'no time left'), cautionRead: fc.boolean() }),
    { freq: 4 },
  ),
});

describe('random days', () => {
  it(`keep the invariants (seed ${SEED})`, () => {
    let accepted = 0;
    fc.assert(
      fc.property(fc.array(deed, { minLength: 20, maxLength: 120 }), (deeds) => {
        accepted += runDays(deeds);
      }),
      { numRuns: RUNS, seed: SEED },
    );
    // Sequences that are only refused would prove nothing.
    expect(accepted / RUNS).toBeGreaterThan(10);
  });
});

function runDays(
  deeds: readonly (typeof deed extends fc.Arbitrary<infer T> ? T : never)[],
): number {
  const shop = aShop({
    stations: aShop().stations.map((each) =>
      each.key === 'oil-rack' ? { ...each, capacity: 6 } : each,
    ),
    clamps: [
      { key: 'short', length: 300_000_000n, count: 5 },
      { key: 'long', length: 600_000_000n, count: 5 },
    ],
  });
  const initial = [1, 2, 3].map((n) => aBatch({ id: `b${n}`, code: `CT-00${n}`, boards: n + 1 }));
  let batches: FloorBatch[] = initial;
  let now = NOW;
  const log: Recorded[] = [];

  for (const each of deeds) {
    now += each.gap;
    const actor = people[each.who] as Actor;
    const batch = batches[each.batch] as FloorBatch;
    const view: FloorView = { shop, batches, now };
    if (each.kind === 'UNDO') {
      const last = log.findLast((entry) => entry.batchId === batch.id);
      if (!last || last.undone) continue;
      const verdict = judgeUndo(
        view,
        batch,
        { by: last.by.memberId, recordedAt: last.at, changes: last.changes, isLatest: true },
        actor,
      );
      if (!verdict.ok) continue;
      batches = replaced(batches, applyChanges(batch, verdict.changes));
      log.push({ batchId: batch.id, by: actor, at: now, changes: verdict.changes, undone: true });
      checkCapacity(shop, batches);
      continue;
    }
    const command = commandOf(each, batch, now);
    if (!command) continue;
    const verdict = judge(view, batch, command, actor);
    if (!verdict.ok) continue;
    expect(actor.roles).not.toContain('OFFICE');
    if (verdict.changes.cut.length > 0) {
      expect(['owner', 'maker']).toContain(actor.memberId);
    }
    const overrides = verdict.changes.cut.map((cut, i): Override => ({
      ...cut,
      id: `${log.length}/${i}`,
      by: actor.memberId,
      at: now,
      reason: 'x',
    }));
    const after = {
      ...applyChanges(batch, verdict.changes),
      overrides: [...batch.overrides, ...overrides],
    };
    expect(after.boards).toBe(batch.boards);
    checkNothingTooSoon(after);
    batches = replaced(batches, after);
    log.push({ batchId: batch.id, by: actor, at: now, changes: verdict.changes, undone: false });
    checkCapacity(shop, batches);
  }
  // Replaying what was recorded gives the rows.
  const replayed = log.reduce(
    (state, { batchId, changes }) =>
      state.map((batch) => (batch.id === batchId ? applyChanges(batch, changes) : batch)),
    initial,
  );
  for (const [i, batch] of batches.entries()) {
    const again = replayed[i] as FloorBatch;
    expect(sorted(again.runs)).toEqual(sorted(batch.runs));
    expect(sorted(again.occupations)).toEqual(sorted(batch.occupations));
    expect(again.releasedAt).toBe(batch.releasedAt);
    expect(again.shippedAt).toBe(batch.shippedAt);
    expect(again.assignedTo).toBe(batch.assignedTo);
  }
  return log.length;
}

function commandOf(
  each: typeof deed extends fc.Arbitrary<infer T> ? T : never,
  batch: FloorBatch,
  now: Instant,
): FloorCommand | null {
  const happenedAt = each.ago === null ? null : now - minutes(each.ago);
  const { override } = each;
  if (each.kind === 'ASSIGN') return { kind: 'ASSIGN', memberId: each.pick % 2 ? 'maker' : null };
  if (each.kind === 'MOVE') {
    const reason = each.pick % 2 ? 'it has to be done again' : null;
    return { kind: 'MOVE', to: each.to, reason, happenedAt, override };
  }
  if (each.kind === 'NEXT') {
    const actions = cardOf(batch, now).actions;
    const action = actions[each.pick % Math.max(1, actions.length)];
    if (!action) return null;
    const { kind, step, piece } = action;
    return { kind, step: step.key, pieces: [piece], happenedAt: null, override: null };
  }
  const step = steps[each.step];
  if (!step || (each.kind !== 'START' && each.kind !== 'FINISH')) return null;
  const all = piecesOf(batch, step.scope);
  const from = each.pick % all.length;
  return {
    kind: each.kind,
    step: step.key,
    pieces: all.slice(from, from + each.many),
    happenedAt,
    override,
  };
}

/** No work started inside a hold that nobody has cut, nor before the work before it was done. */
function checkNothingTooSoon(batch: FloorBatch): void {
  batch.route.steps.forEach((step, index) => {
    if (step.kind !== 'WORK') return;
    for (const piece of piecesOf(batch, step.scope)) {
      const startedAt = runOf(batch, step.key, piece)?.startedAt ?? null;
      if (startedAt === null) continue;
      for (const before of batch.route.steps.slice(0, index)) {
        for (const related of relatedPieces(batch, before.scope, step.scope, piece)) {
          if (before.kind === 'WORK') {
            const finishedAt = runOf(batch, before.key, related)?.finishedAt ?? null;
            expect(
              finishedAt,
              `${step.key}/${piece} before ${before.key}/${related}`,
            ).not.toBeNull();
            expect(finishedAt).toBeLessThanOrEqual(startedAt);
            continue;
          }
          const wait = waitOn(batch, before, related);
          expect(wait, `${step.key}/${piece} without ${before.key}/${related}`).not.toBeNull();
          expect(wait?.clearAt).toBeLessThanOrEqual(startedAt);
          if (wait?.cut) {
            const written = batch.overrides.some(
              (override) => override.step === before.key && override.piece === related,
            );
            expect(written).toBe(true);
          }
        }
      }
    }
  });
  expect(panelCountOf(batch.needs, batch.boards)).toBe(piecesOf(batch, 'PANEL').length);
}

/** No clamp on two pieces and no station beyond its capacity, at any instant of the whole history. */
function checkCapacity(shop: ReturnType<typeof aShop>, batches: readonly FloorBatch[]): void {
  const all = batches.flatMap((batch) =>
    batch.occupations.map((o) => ({ ...o, batchId: batch.id })),
  );
  const instants = new Set(all.map((o) => o.since));
  for (const at of instants) {
    const active = all.filter((o) => o.since <= at && (o.until === null || o.until > at));
    for (const clamp of shop.clamps) {
      const used = active.filter((o) => o.isClamps && o.resource === clamp.key);
      expect(used.reduce((sum, o) => sum + o.amount, 0)).toBeLessThanOrEqual(clamp.count);
    }
    for (const station of shop.stations) {
      const used = active.filter((o) => !o.isClamps && o.resource === station.key);
      const level =
        station.unit === 'BATCH'
          ? new Set(used.map((o) => o.batchId)).size
          : used.reduce((sum, o) => sum + o.amount, 0);
      expect(level, station.key).toBeLessThanOrEqual(station.capacity);
    }
  }
}

function replaced(batches: readonly FloorBatch[], after: FloorBatch): FloorBatch[] {
  return batches.map((batch) => (batch.id === after.id ? after : batch));
}

function sorted<T>(items: readonly T[]): T[] {
  return [...items].sort((a, b) => (JSON.stringify(a) < JSON.stringify(b) ? -1 : 1));
}
