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
import { readyFor } from '#test/factories/working-floor';
import { PLACES, rankOf, stepAt } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';
import { applyChanges } from './apply';
import { judge, type FloorView } from './judge';
import type { Actor, FloorBatch, FloorChangeSet, FloorCommand, Override } from './model';
import { panelCountOf, piecesOf, relatedPieces } from './pieces';
import { cardOf } from './card';
import { holdsOf, placeOf, runOf, waitOn } from './progress';
import { judgeUndo } from './undo';

/*
 * Random days in a small shop: random people of random roles do random things, also late, and take some of them back.
 * Whatever the rules let pass must keep the shop's invariants.
 */

const deep = process.env['DEEP'] === '1';
const RUNS = deep ? 5_000 : 120;
const SEED = 20261201;

interface Recorded {
  batchId: string;
  by: Actor;
  at: Instant;
  changes: FloorChangeSet;
  /** The batch as it was before. */
  before: FloorBatch;
  undone: boolean;
}

/** How often the days came to what they are there to try. */
const met = { accepted: 0, undone: 0, overridden: 0, reworked: 0, backdated: 0, full: 0 };

const people: readonly Actor[] = [
  OWNER,
  MAKER,
  HELPER,
  OFFICE,
  { memberId: 'h2', roles: ['HELPER'] },
];
const steps = aBatch().route.steps.filter((step) => step.kind === 'WORK');

/** Where a batch stands when the days begin: at the beginning, or with everything before some step done. */
const beginning = fc.option(fc.integer({ min: 1, max: steps.length - 1 }), { freq: 3 });

function sometimes<T>(what: fc.Arbitrary<T>): fc.Arbitrary<T | null> {
  return fc.oneof({ weight: 2, arbitrary: fc.constant(null) }, { weight: 1, arbitrary: what });
}

const gap = fc.oneof(
  { weight: 2, arbitrary: fc.constant(0) },
  { weight: 4, arbitrary: fc.integer({ min: 1, max: 40 }).map(minutes) },
  { weight: 2, arbitrary: fc.integer({ min: 1, max: 16 }).map(hours) },
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
    'TOO_SOON',
    'TOO_SOON',
    'MOVE',
    'MOVE',
    'UNDO',
    'UNDO',
    'ASSIGN',
  ),
  step: fc.integer({ min: 0, max: steps.length - 1 }),
  pick: fc.nat({ max: 30 }),
  many: fc.integer({ min: 1, max: 4 }),
  to: fc.constantFrom(...PLACES),
  ago: sometimes(fc.integer({ min: -5, max: 400 })),
  override: sometimes(
    fc.record({
      reason: fc.constantFrom('', 'no time left', 'no time left'),
      cautionRead: fc.constantFrom(true, true, false),
    }),
  ),
});

describe('random days', () => {
  it(`keep the invariants (seed ${SEED})`, () => {
    fc.assert(
      fc.property(
        fc.array(deed, { minLength: 20, maxLength: 120, size: 'max' }),
        fc.tuple(beginning, beginning, beginning),
        runDays,
      ),
      { numRuns: RUNS, seed: SEED },
    );
    // Sequences that are only refused, or never come to the hard parts, would prove nothing.
    expect(met.accepted / RUNS).toBeGreaterThan(10);
    expect(met.undone / RUNS).toBeGreaterThan(0.5);
    for (const times of Object.values(met)) expect(times, JSON.stringify(met)).toBeGreaterThan(10);
  });
});

type Deed = typeof deed extends fc.Arbitrary<infer T> ? T : never;

function runDays(deeds: readonly Deed[], beginnings: readonly (number | null)[]): void {
  const shop = aShop({
    stations: aShop().stations.map((each) =>
      each.key === 'oil-rack' ? { ...each, capacity: 6 } : each,
    ),
    clamps: [
      { key: 'short', length: 300_000_000n, count: 5 },
      { key: 'long', length: 600_000_000n, count: 5 },
    ],
  });
  const initial = beginnings.map((step, i): FloorBatch => {
    const batch = aBatch({ id: `b${i + 1}`, code: `CT-00${i + 1}`, boards: i + 2 });
    const key = steps[step ?? 0]?.key;
    return step === null || !key ? { ...batch, releasedAt: null } : readyFor(batch, key, NOW);
  });
  let batches: FloorBatch[] = initial;
  let now = NOW;
  const log: Recorded[] = [];

  for (const each of deeds) {
    // People notice a mistake soon, or never.
    now += each.kind === 'UNDO' ? each.gap % minutes(12) : each.gap;
    const actor = people[each.who] as Actor;
    const mistaken = each.kind === 'UNDO' && each.pick % 3 > 0 ? log.at(-1)?.batchId : undefined;
    const held =
      each.kind === 'TOO_SOON'
        ? batches.find((one) => holdsOf(one, now).length > 0)?.id
        : undefined;
    const wanted = mistaken ?? held;
    const batch = (batches.find(({ id }) => id === wanted) ?? batches[each.batch]) as FloorBatch;
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
      const after = applyChanges(batch, verdict.changes);
      checkRestored(after, last.before);
      batches = replaced(batches, after);
      log.push({
        batchId: batch.id,
        by: actor,
        at: now,
        changes: verdict.changes,
        before: batch,
        undone: true,
      });
      met.undone += 1;
      checkCapacity(shop, batches);
      continue;
    }
    const command = commandOf(each, batch, now);
    if (!command) continue;
    const verdict = judge(view, batch, command, actor);
    if (!verdict.ok) {
      if (['STATION_FULL', 'CLAMPS_FULL'].includes(verdict.refusal.code)) met.full += 1;
      continue;
    }
    expect(actor.roles).not.toContain('OFFICE');
    if (verdict.changes.cut.length > 0) {
      expect(['owner', 'maker']).toContain(actor.memberId);
      met.overridden += 1;
    }
    if (command.kind === 'MOVE') checkReworkLeavesNoHold(batch, command, now, verdict.changes);
    if (command.kind !== 'ASSIGN' && command.happenedAt !== null) met.backdated += 1;
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
    log.push({
      batchId: batch.id,
      by: actor,
      at: now,
      changes: verdict.changes,
      before: batch,
      undone: false,
    });
    met.accepted += 1;
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
}

function commandOf(each: Deed, batch: FloorBatch, now: Instant): FloorCommand | null {
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
    const late = kind === 'FINISH' ? happenedAt : null;
    return { kind, step: step.key, pieces: [piece], happenedAt: late, override: null };
  }
  if (each.kind === 'TOO_SOON') {
    // The work that the hold which clears first keeps back, or the stage after it.
    const [hold] = holdsOf(batch, now);
    const from = hold ? (stepAt(batch.route, hold.step)?.index ?? 0) : 0;
    const next = batch.route.steps.slice(from).find((step) => step.kind === 'WORK');
    if (!hold || !next) return null;
    const cut = override ?? { reason: 'no time left', cautionRead: true };
    if (each.pick % 4 === 0) {
      return { kind: 'MOVE', to: each.to, reason: null, happenedAt, override: cut };
    }
    const pieces = next.scope === 'BATCH' ? [0] : [hold.piece];
    return { kind: 'START', step: next.key, pieces, happenedAt: null, override: cut };
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
      must(startedAt >= (batch.releasedAt ?? Infinity), `${step.key}/${piece} before its release`);
      for (const before of batch.route.steps.slice(0, index)) {
        for (const related of relatedPieces(batch, before.scope, step.scope, piece)) {
          const what = `${step.key}/${piece} too soon for ${before.key}/${related}`;
          if (before.kind === 'WORK') {
            must((runOf(batch, before.key, related)?.finishedAt ?? Infinity) <= startedAt, what);
            continue;
          }
          const wait = waitOn(batch, before, related);
          must(wait !== null && wait.clearAt <= startedAt, what);
          const isWritten = batch.overrides.some(
            (override) => override.step === before.key && override.piece === related,
          );
          must(wait?.cut === false || isWritten, `${before.key}/${related} cut, not written down`);
        }
      }
    }
  });
  must(panelCountOf(batch.needs, batch.boards) === piecesOf(batch, 'PANEL').length, 'panels');
}

/** As `expect`, for what is asked thousands of times. */
function must(holds: boolean, what: string): void {
  if (!holds) throw new Error(what);
}

/** Putting steps back frees no wood whose hold runs, unless that is written down. */
function checkReworkLeavesNoHold(
  before: FloorBatch,
  command: Extract<FloorCommand, { kind: 'MOVE' }>,
  now: Instant,
  changes: FloorChangeSet,
): void {
  const at = command.happenedAt ?? now;
  if (rankOf(command.to) >= rankOf(placeOf(before, at))) return;
  met.reworked += 1;
  for (const hold of holdsOf(before, at)) {
    const stage = stepAt(before.route, hold.step)?.step.stage ?? 'FINISH';
    if (rankOf(stage) < rankOf(command.to) || hold.since > at) continue;
    const isCut = changes.cut.some((cut) => cut.step === hold.step && cut.piece === hold.piece);
    expect(isCut, `rework frees ${hold.step}/${hold.piece}`).toBe(true);
  }
}

/** Taking back restores what was: every row, but for overrides and for what was occupied for no time at all. */
function checkRestored(after: FloorBatch, before: FloorBatch): void {
  const lasting = (batch: FloorBatch) => batch.occupations.filter((o) => o.since !== o.until);
  expect(sorted(after.runs)).toEqual(sorted(before.runs));
  expect(sorted(lasting(after))).toEqual(sorted(lasting(before)));
  expect(after.releasedAt).toBe(before.releasedAt);
  expect(after.shippedAt).toBe(before.shippedAt);
  expect(after.assignedTo).toBe(before.assignedTo);
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
      must(used.reduce((sum, o) => sum + o.amount, 0) <= clamp.count, `${clamp.key} at ${at}`);
    }
    for (const station of shop.stations) {
      const used = active.filter((o) => !o.isClamps && o.resource === station.key);
      const level =
        station.unit === 'BATCH'
          ? new Set(used.map((o) => o.batchId)).size
          : used.reduce((sum, o) => sum + o.amount, 0);
      must(level <= station.capacity, `${station.key} at ${at}`);
    }
  }
}

function replaced(batches: readonly FloorBatch[], after: FloorBatch): FloorBatch[] {
  return batches.map((batch) => (batch.id === after.id ? after : batch));
}

function sorted<T>(items: readonly T[]): T[] {
  return [...items].sort((a, b) => (JSON.stringify(a) < JSON.stringify(b) ? -1 : 1));
}
