import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { localId } from '#server/http/global-id';
import { toCursor } from '#server/live/cursor';
import { migratedDatabase, type TestDatabase } from '../database';
import { startApiServer, type ApiServer } from '../factories/api-server';
import {
  assign,
  done,
  finish,
  makeBatch,
  move,
  start,
  type BatchAnswer,
} from '../factories/commands';
import { follow, type Follower } from '../factories/follower';
import { newMember, newOwner, type Person } from '../factories/people';
import { newDesign } from '../factories/things';
import { until } from '../factories/until';

/* What happens on the Floor reaches whoever watches, whichever of two servers they watch. */

let database: TestDatabase;
let a: ApiServer;
let b: ApiServer;
let owner: Person;
let helper: Person;
let designId: string;
let batches: BatchAnswer[];

beforeAll(async () => {
  database = await migratedDatabase();
  a = await startApiServer({}, { database });
  b = await startApiServer({}, { database });
  owner = await newOwner(a);
  helper = await newMember(a, owner, ['HELPER']);
  designId = await newDesign(owner.caller);
  const make = () => done(makeBatch(owner.caller, { designId, boards: 1 }));
  batches = [await make(), await make(), await make()];
});
afterAll(async () => {
  await Promise.all([a.stop(), b.stop()]);
  await database.drop();
});

/** The person as the other server knows them. */
const on = (server: ApiServer, { caller }: Person) => caller.at(server.url);

/** Gives a batch to somebody else: the smallest command there is. Returns the number of its event. */
async function command(index = 0, caller = owner.caller): Promise<number> {
  const batch = batches[index] as BatchAnswer;
  const to = batch.assignedTo === helper.memberId ? owner.memberId : helper.memberId;
  const answered = await assign(caller, batch, to);
  batches[index] = await done(Promise.resolve(answered));
  return answered.event ?? 0;
}

async function floorOf(server: ApiServer) {
  const { floor } = await on(server, owner).get<{
    floor: { cursor: string; watchers: number; batches: { id: string; version: number }[] };
  }>('{ floor { cursor watchers batches { id version } } }');
  return floor;
}

/** That numbers only grow: nothing twice, nothing out of order. */
function expectInOrder({ seqs }: Follower): void {
  const all = seqs();
  expect(all).toEqual([...new Set(all)].sort((x, y) => x - y));
}

describe('subscribers', () => {
  it('get everything once and in order, on both servers, whoever commands where', async () => {
    const followers = await Promise.all([
      follow(a, owner.caller),
      follow(b, on(b, owner)),
      follow(b, on(b, helper)),
    ]);
    const before = batches.map(({ version }) => version);
    let last = 0;
    for (let round = 0; round < 5; round++) {
      // Three batches at the same moment, by different people on different servers.
      const seqs = await Promise.all([
        command(0),
        command(1, on(b, helper)),
        command(2, on(b, owner)),
      ]);
      last = Math.max(...seqs);
      for (const follower of followers) await follower.reached(last);
    }
    for (const follower of followers) {
      expectInOrder(follower);
      expect(follower.messages.filter(({ reset }) => reset)).toEqual([]);
      batches.forEach(({ id }, i) => {
        const from = before[i] ?? 0;
        expect(follower.versions(id)).toEqual([1, 2, 3, 4, 5].map((n) => from + n));
      });
      await follower.end();
    }
  });

  it('resume after a lost connection, with what they missed and nothing else', async () => {
    const first = await follow(a, owner.caller);
    await first.reached(await command(0));
    const seen = first.messages.at(-1)?.cursor ?? null;
    first.cut();
    await first.closed;
    await command(0);
    await command(1);
    const last = await command(0);
    // The other server takes them on as well as the one they lost.
    for (const [server, caller] of [
      [a, owner.caller],
      [b, on(b, owner)],
    ] as const) {
      const again = await follow(server, caller, seen);
      await again.reached(last);
      expect(again.messages.some(({ reset }) => reset)).toBe(false);
      expect(again.messages[0]?.batches.map(({ id }) => id)).toEqual(
        expect.arrayContaining([batches[0]?.id, batches[1]?.id]),
      );
      expect(again.versions(batches[2]?.id ?? '')).toEqual([]);
      expect(again.versions(batches[0]?.id ?? '').at(-1)).toBe(batches[0]?.version);
      expectInOrder(again);
      await again.end();
    }
  });

  it('resume after their server was started anew', async () => {
    const first = await follow(b, on(b, owner));
    await first.reached(await command(0));
    const seen = first.messages.at(-1)?.cursor ?? null;
    await b.stop();
    expect([1001, 1006]).toContain(await first.closed);
    const missed = await command(1);
    b = await startApiServer({}, { database });
    const again = await follow(b, on(b, owner), seen);
    await again.reached(missed);
    expect(again.messages[0]?.reset).toBe(false);
    expect(again.versions(batches[1]?.id ?? '')).toEqual([batches[1]?.version]);
    await again.reached(await command(1));
    expectInOrder(again);
    await again.end();
  });

  it('miss nothing between reading the Floor and subscribing', async () => {
    const { cursor } = await floorOf(a);
    const last = await command(2);
    const follower = await follow(b, on(b, owner), cursor);
    await follower.reached(last);
    expect(follower.messages[0]?.reset).toBe(false);
    expect(follower.versions(batches[2]?.id ?? '')).toEqual([batches[2]?.version]);
    await follower.end();
  });

  it('come from another server that has read further, and are not sent back', async () => {
    // B knows the shop and has not heard yet of what was committed on A.
    const watching = await follow(b, on(b, owner));
    const shopId = localId('shop', owner.shopId) ?? '';
    for (let round = 0; round < 5; round++) {
      const seq = await command(0);
      const stream = b.services.hub.follow(shopId, seq);
      const next = stream.next();
      await command(1);
      const { value } = await next;
      expect(value).toMatchObject({ reset: false });
      expect(value?.seq).toBeGreaterThan(seq);
      await stream.return();
    }
    await watching.end();
  });

  it('without a place in the stream get what happens from now on', async () => {
    const follower = await follow(a, owner.caller, null);
    await until(
      'it is told of what happens',
      async () => {
        await command(2);
        return follower.messages.length;
      },
      (count) => count > 0,
    );
    expect(follower.messages[0]?.reset).toBe(false);
    await follower.end();
  });

  it('see who has seen an override, on every screen', async () => {
    let batch = await done(makeBatch(owner.caller, { designId, boards: 1 }));
    batch = await done(move(owner.caller, batch, 'FIRST_GLUE_UP'));
    batch = await done(start(owner.caller, batch, 'glue-1', [1]));
    batch = await done(finish(owner.caller, batch, 'glue-1', [1]));
    const override = { reason: 'one more clamp is needed', cautionRead: true };
    batch = await done(start(owner.caller, batch, 'unclamp-1', [1], { override }));
    const follower = await follow(b, on(b, helper));
    await owner.caller.get('mutation ($id: ID!) { seeOverride(id: $id) }', {
      id: batch.overrides[0]?.id,
    });
    await until(
      'the override is seen',
      () => follower.messages.flatMap((message) => message.batches),
      (told) => told.some(({ id, overrides }) => id === batch.id && overrides[0]?.seen === true),
    );
    // It is no command on the batch: the last one can still be undone.
    expect(follower.messages.flatMap((m) => m.batches).at(-1)?.undo?.by).toBe(owner.memberId);
    await follower.end();
  });
});

describe('a reset', () => {
  /** Events as a restored backup or a long night brings them, all in one transaction. */
  async function append(count: number): Promise<number> {
    const { rows } = await a.admin.query<{ seq: number }>(
      `with counter as (
         update shop_counter set seq = seq + $2 where shop_id = $1 returning seq
       ), events as (
         insert into event (shop_id, seq, type, happened_at, recorded_at, data)
         select $1, seq - $2 + n, 'OVERRIDE_SEEN', now(), now(), jsonb_build_object('batchId', $3::text)
         from counter, generate_series(1, $2) as n
       ) select seq from counter`,
      [localId('shop', owner.shopId), count, localId('batch', batches[0]?.id ?? '')],
    );
    return rows[0]?.seq ?? 0;
  }

  const currentSeq = async () => {
    const { rows } = await a.admin.query<{ seq: number }>('select seq from shop_counter');
    return rows[0]?.seq ?? 0;
  };

  it('is for who is more than a thousand events behind', async () => {
    const last = await append(1_001);
    const far = await follow(b, on(b, owner), toCursor((await currentSeq()) - 1_001));
    await far.reached(last);
    expect(far.messages[0]).toMatchObject({ reset: true, batches: [] });
    await far.reached(await command(0));
    expect(far.versions(batches[0]?.id ?? '')).toEqual([batches[0]?.version]);
    expectInOrder(far);
    await far.end();
    const near = await follow(b, on(b, owner), toCursor((await currentSeq()) - 900));
    await near.reached(last);
    expect(near.messages[0]?.reset).toBe(false);
    await near.end();
  });

  it('is for who watches while more than that happens at once', async () => {
    const follower = await follow(b, on(b, owner));
    const last = await append(1_001);
    await command(0);
    await follower.reached(last);
    expect(follower.messages.find(({ reset }) => reset)).toBeDefined();
    expectInOrder(follower);
    await follower.end();
  });

  it('is for who holds a cursor of what never was', async () => {
    const seq = await currentSeq();
    for (const server of [a, b]) {
      const follower = await follow(server, on(server, owner), toCursor(seq + 50_000));
      await follower.reached(1);
      expect(follower.messages[0]?.reset).toBe(true);
      expect(follower.seqs()[0]).toBeLessThan(seq + 50_000);
      // From there on it goes on as for everyone else.
      await follower.reached(await command(0));
      expectInOrder(follower);
      await follower.end();
    }
  });
});

describe('nothing is left behind', () => {
  it('by two hundred who come and go while nothing happens in the shop', async () => {
    const quiet = await newOwner(a);
    const subscriptions = () => a.services.hub.subscriptions + b.services.hub.subscriptions;
    await until('nobody watches any more', subscriptions, (count) => count === 0);
    for (let wave = 0; wave < 4; wave++) {
      const some = await Promise.all(
        Array.from({ length: 50 }, (_, i) => follow(i % 5 === 0 ? b : a, quiet.caller, null)),
      );
      await until('they are there', subscriptions, (count) => count === 50);
      await Promise.all(some.map((each, i) => (i % 2 ? each.end() : each.cut())));
      await until('they are gone', subscriptions, (count) => count === 0);
    }
    expect(a.services.hub.followed + b.services.hub.followed).toBe(0);
  });
});
