import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { applyChanges } from '#shared/floor/apply';
import { cardOf } from '#shared/floor/card';
import type { FloorBatch, FloorChangeSet } from '#shared/floor/model';
import { piecesOf } from '#shared/floor/pieces';
import { PLACES, type Place } from '#shared/route/route';
import { loadBatches, loadFloorShop } from '#server/floor/load';
import { globalId, localId } from '#server/http/global-id';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { TestClock } from '../factories/clock';
import {
  assign,
  done,
  finish,
  makeBatch,
  move,
  start,
  undo,
  type CommandAnswer,
} from '../factories/commands';
import { expectCapacityKept, expectNothingTooSoon } from '../factories/floor-invariants';
import type { EventRow } from '../factories/floor-rows';
import { newMember, newOwner, type Person } from '../factories/people';
import { Random } from '../factories/random';
import { newDesign } from '../factories/things';

/*
 * Random people of random roles command the same few batches, some at the same moment, over HTTP against the database.
 * Whatever comes of it, one of those who want the same wins, the shop's invariants hold at every moment, and the events
 * tell exactly how the rows came to be.
 */

const deep = process.env['DEEP'] === '1';
const ROUNDS = deep ? 2_000 : 50;
const SEED = 20261202;

const clock = new TestClock(Date.parse('2026-12-01T08:00:00Z'));
const random = new Random(SEED);
let server: ApiServer;
let people: (Person & { name: string })[];
let shopId: string;
let batchIds: string[];
const wins = { alone: 0, contested: 0, conflicts: 0, undone: 0, overriding: 0 };

beforeAll(async () => {
  server = await startApiServer({}, { now: clock.now });
  const owner = await newOwner(server, { name: 'Ada' });
  people = [{ ...owner, name: 'Ada' }];
  const roles = [['MAKER'], ['HELPER'], ['HELPER'], ['OFFICE']] as const;
  for (const [i, name] of ['Bo', 'Cy', 'Di', 'Ed'].entries()) {
    const person = await newMember(server, owner, roles[i] ?? ['HELPER']);
    await server.admin.query('update member set name = $2 where id = $1', [
      localId('member', person.memberId),
      name,
    ]);
    people.push({ ...person, name });
  }
  shopId = localId('shop', owner.shopId) ?? '';
  // Few clamps and a small rack, so that there is something to fight for.
  await server.admin.query('update clamp_class set count = 5 where shop_id = $1', [shopId]);
  await server.admin.query(`update station set capacity = 6 where key = 'oil-rack'`);
  const designId = await newDesign(owner.caller, { panelBoards: 2 });
  batchIds = [];
  for (const boards of [2, 3, 4]) {
    const { id } = await done(makeBatch(owner.caller, { designId, boards }));
    batchIds.push(localId('batch', id) ?? '');
  }
});
afterAll(() => server.stop());

const load = () =>
  server.services.doors.readShop(shopId, async (tx) => ({
    shop: await loadFloorShop(tx),
    loaded: await loadBatches(tx, { ids: batchIds }, clock.now(), 0),
  }));

interface Given {
  by: Person & { name: string };
  /** Whether it names a version, so that only one of several may pass. */
  named: boolean;
  answer: Promise<CommandAnswer>;
}

/** A command as somebody in a shop might give it, sensible more often than not. */
function give(by: Given['by'], batch: FloorBatch, lastEvent: number | null): Given {
  const { caller } = by;
  const known = { id: globalId('batch', batch.id), version: batch.version };
  const override = random.chance(0.25)
    ? { reason: random.chance(0.9) ? 'no time left today' : '', cautionRead: random.chance(0.9) }
    : null;
  const late = random.chance(0.2) ? clock.ago(random.below(300) - 5) : null;
  const more = { override, happenedAt: late };
  const { actions, holds, place } = cardOf(batch, clock.now().getTime());
  const [hold] = holds;
  if (hold && random.chance(0.25)) {
    // Somebody has no time for the hold: the work right behind it, or the next stage.
    const index = batch.route.steps.findIndex((step) => step.key === hold.step);
    const next = batch.route.steps.slice(index).find((step) => step.kind === 'WORK');
    const hurry = { override: { reason: 'no time left today', cautionRead: true } };
    return next && random.chance(0.7)
      ? { by, named: true, answer: start(caller, known, next.key, [hold.piece], hurry) }
      : { by, named: true, answer: move(caller, known, after(place), hurry) };
  }
  const kind = random.next();
  if (kind < 0.6) {
    if (actions.length > 0) {
      const { kind: verb, step, piece } = random.pick(actions);
      const same = actions.filter((each) => each.kind === verb && each.step.key === step.key);
      const pieces = random.chance(0.5) ? [piece] : same.map((each) => each.piece);
      const command = verb === 'START' ? start : finish;
      return { by, named: true, answer: command(caller, known, step.key, pieces) };
    }
  }
  if (kind < 0.72) {
    const step = random.pick(batch.route.steps.filter((each) => each.kind === 'WORK'));
    const pieces = piecesOf(batch, step.scope).filter(() => random.chance(0.7));
    const command = random.chance(0.7) ? start : finish;
    return { by, named: true, answer: command(caller, known, step.key, pieces, more) };
  }
  if (kind < 0.86) {
    // Mostly a little further, sometimes anywhere; out of the shop last of all.
    const to = random.chance(0.7) ? after(place) : random.pick(PLACES.slice(0, -1));
    const reason = random.chance(0.7) ? 'it has to be done again' : null;
    return { by, named: true, answer: move(caller, known, to, { ...more, reason }) };
  }
  if (kind < 0.93) return { by, named: false, answer: undo(caller, known, lastEvent ?? 1) };
  const to = random.chance(0.3) ? null : random.pick(people).memberId;
  return { by, named: true, answer: assign(caller, known, to) };
}

/** The next place; batches stay in the shop, so that there is something left to do. */
function after(place: Place): Place {
  return PLACES[Math.min(PLACES.indexOf(place) + 1, PLACES.length - 2)] ?? 'READY';
}

/** Of those who named one version of a batch at most one passes; whoever comes after learns whose it is now. */
async function expectOneWinner(batch: FloorBatch, given: readonly Given[]): Promise<void> {
  const answers = await Promise.all(
    given.map(async (each) => ({ ...each, ...(await refusalOr(each.answer)) })),
  );
  const passed = answers.filter((each) => each.event !== null);
  const winners = passed.filter((each) => each.named);
  expect(winners.length).toBeLessThanOrEqual(1);
  for (const { named, event, problems, by } of answers) {
    if (event !== null) {
      expect(['Ada', 'Bo', 'Cy', 'Di']).toContain(by.name);
      continue;
    }
    expect(problems).toHaveLength(1);
    if (problems[0]?.code !== 'VERSION_CONFLICT') continue;
    wins.conflicts++;
    expect(named).toBe(true);
    expect(passed.map((each) => `${each.by.name} changed ${batch.code}`)).toContain(
      problems[0].sentence.slice(0, problems[0].sentence.indexOf(' a moment')),
    );
  }
  wins.overriding += winners.filter(({ batch: told }) => told?.overrides.length).length;
  wins.undone += passed.length - winners.length;
  if (given.length === 1) wins.alone += winners.length;
  else wins.contested += winners.length;
}

/** The office is stopped before the rules are asked: by an error, which counts as a refusal here. */
async function refusalOr(answer: Promise<CommandAnswer>): Promise<CommandAnswer> {
  try {
    return await answer;
  } catch (error) {
    expect(String(error)).toContain('FORBIDDEN');
    return {
      batch: null,
      event: null,
      problems: [{ code: 'FORBIDDEN', field: null, sentence: '' }],
    };
  }
}

describe('random people on the Floor', () => {
  it(`command ${ROUNDS} times, some at the same moment (seed ${SEED})`, async () => {
    // How commands at one moment fall out is not the seed's: where nobody has undone or overridden yet, it goes on.
    const enough = () => wins.undone > 0 && wins.overriding > 0 && wins.conflicts > 4;
    for (let round = 0; round < ROUNDS || (!enough() && round < 5 * ROUNDS); round++) {
      if (random.chance(0.6)) clock.pass(random.below(random.chance(0.3) ? 60 * 14 : 25));
      const { loaded } = await load();
      const { floor, undo: last } = random.pick(loaded);
      const crowd = random.chance(0.4) ? 2 + random.below(3) : 1;
      const given = Array.from({ length: crowd }, () =>
        give(random.pick(people), floor, last?.event ?? null),
      );
      // Somebody else is at another batch meanwhile, and may want the same clamps.
      const other = random.pick(loaded);
      const beside =
        other.floor.id === floor.id
          ? []
          : [give(random.pick(people), other.floor, other.undo?.event ?? null)];
      await Promise.all([
        expectOneWinner(floor, given),
        ...(beside.length > 0 ? [expectOneWinner(other.floor, beside)] : []),
      ]);
    }
    // Sequences that are only refused, or never contested, would prove nothing.
    expect(wins.alone + wins.contested).toBeGreaterThan(ROUNDS / 4);
    expect(wins.contested).toBeGreaterThan(ROUNDS / 20);
    expect(enough()).toBe(true);
  }, 600_000);

  it('leave events without holes, one version after another', async () => {
    const { rows: events } = await server.admin.query<EventRow>(
      'select * from event where shop_id = $1 order by seq',
      [shopId],
    );
    const { rows } = await server.admin.query<{ seq: number }>('select seq from shop_counter');
    expect(events.map(({ seq }) => seq)).toEqual(events.map((_, i) => i + 1));
    expect(rows).toEqual([{ seq: events.length }]);
    for (const id of batchIds) {
      const versions = events
        .filter((each) => each.batch_id === id)
        .map(({ data }) => data['version']);
      expect(versions).toEqual(versions.map((_, i) => i + 1));
    }
  });

  it('break no invariant at any moment, and replaying the events gives the rows', async () => {
    const { shop, loaded } = await load();
    const { rows: events } = await server.admin.query<EventRow>(
      'select * from event where batch_id is not null order by seq',
    );
    const beginnings = loaded.map(({ floor }): FloorBatch => ({
      ...floor,
      version: 1,
      releasedAt: null,
      shippedAt: null,
      assignedTo: null,
      runs: [],
      occupations: [],
      overrides: [],
    }));
    const replayed = new Map(beginnings.map((batch) => [batch.id, batch]));
    let cuts = 0;
    for (const [index, { type, batch_id: id, data }] of events.entries()) {
      const before = replayed.get(id ?? '');
      if (!before || type === 'BATCH_MADE') continue;
      const { changes, overrideIds = [] } = data as {
        changes: FloorChangeSet;
        overrideIds?: string[];
      };
      // Each hold that an event cut short has its own override on record, with who and why.
      const stored = loaded.find(({ floor }) => floor.id === id)?.floor.overrides ?? [];
      const written = overrideIds.map((each) => stored.find((o) => o.id === each));
      expect(written.map((each) => [each?.step, each?.piece])).toEqual(
        changes.cut.map((cut) => [cut.step, cut.piece]),
      );
      for (const each of written) expect(each?.reason).toBe('no time left today');
      cuts += changes.cut.length;
      const after = {
        ...applyChanges(before, changes),
        version: before.version + 1,
        overrides: [...before.overrides, ...written.filter((each) => each !== undefined)],
      };
      expectNothingTooSoon(after);
      replayed.set(after.id, after);
      // Occupations say since when and until when: what a check at the end sees of the past is all there was.
      if (events.length < 500 || index % 100 === 0)
        expectCapacityKept(shop, [...replayed.values()]);
    }
    expectCapacityKept(shop, [...replayed.values()]);
    expect(cuts).toBeGreaterThan(0);
    for (const { floor } of loaded) {
      const again = replayed.get(floor.id);
      expect(comparable(again)).toEqual(comparable(floor));
    }
  });

  it('conserve the boards', async () => {
    const { rows } = await server.admin.query<{ boards: number; rows: number }>(
      `select b.boards, (select count(*) from board where batch_id = b.id)::int as rows from batch b order by code`,
    );
    expect(rows).toEqual([2, 3, 4].map((boards) => ({ boards, rows: boards })));
  });
});

/** A batch without what replaying cannot know, in one order. */
function comparable(batch: FloorBatch | undefined) {
  const sorted = <Item>(items: readonly Item[]) =>
    items.map((item) => JSON.stringify(item, Object.keys(item as object).sort())).sort();
  return {
    ...batch,
    runs: sorted(batch?.runs ?? []),
    occupations: sorted(batch?.occupations ?? []),
    overrides: sorted(batch?.overrides ?? []),
  };
}
