import { buildSchema, getNamedType, isObjectType, type GraphQLObjectType } from 'graphql';
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { localId } from '#server/http/global-id';
import { migratedDatabase, type TestDatabase } from '../database';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { assign, done, makeBatch, type BatchAnswer } from '../factories/commands';
import { follow } from '../factories/follower';
import { newClient, newMember, newOwner, newScreen, type Person } from '../factories/people';
import { openSocket, subscribe } from '../factories/sockets';
import { newDesign, newOrder } from '../factories/things';
import { until } from '../factories/until';
import { repository } from '../server';

/* Two servers on one database: who relays and plans, lost connections, and credentials that end on both. */

let database: TestDatabase;
let a: ApiServer;
let b: ApiServer;
let owner: Person;
let shopId: string;
let designId: string;
let batch: BatchAnswer;

beforeAll(async () => {
  database = await migratedDatabase();
  a = await startApiServer({}, { database });
  b = await startApiServer({}, { database });
  owner = await newOwner(a);
  shopId = localId('shop', owner.shopId) ?? '';
  designId = await newDesign(owner.caller);
  batch = await done(makeBatch(owner.caller, { designId, boards: 1 }));
});
afterAll(async () => {
  await Promise.all([a.stop(), b.stop()]);
  await database.drop();
});

async function command(server: ApiServer): Promise<number> {
  const to = batch.assignedTo === null ? owner.memberId : null;
  const answered = await assign(owner.caller.at(server.url), batch, to);
  batch = await done(Promise.resolve(answered));
  return answered.event ?? 0;
}

const planned = async () => {
  const { rows } = await a.admin.query<{ version: number; seq: number }>(
    'select version, seq from plan where shop_id = $1 order by version',
    [shopId],
  );
  return rows;
};

/** Waits until a plan knows what was commanded up to an event. */
const plannedUpTo = (seq: number) =>
  until(`event ${seq} is planned`, planned, (rows) => (rows.at(-1)?.seq ?? 0) >= seq);

/** Ends all connections of a door, as a restart of the network between would. */
async function endConnections(role: 'relay' | 'work' | 'shop' | 'entry'): Promise<void> {
  await a.admin.query(
    `select pg_terminate_backend(pid) from pg_stat_activity where usename = $1 and datname = current_database()`,
    [`clamptide_${role}`],
  );
}

/** Who holds one of the product's advisory locks. */
async function holders(first: number): Promise<number[]> {
  const { rows } = await a.admin.query<{ pid: number }>(
    `select pid from pg_locks l join pg_database d on d.oid = l.database
     where locktype = 'advisory' and granted and datname = current_database() and $1 in (classid::int, objid::int)`,
    [first],
  );
  return rows.map(({ pid }) => pid);
}

const RELAY_LOCK = 7_301_103;
const WORKER_LOCK = 7_301_104;

describe('two servers', () => {
  it('relay and plan as one', async () => {
    let last = 0;
    for (let round = 0; round < 6; round++) last = await command(round % 2 ? a : b);
    await plannedUpTo(last);
    expect(await holders(RELAY_LOCK)).toHaveLength(1);
    expect(await holders(WORKER_LOCK)).toHaveLength(2);
    const versions = (await planned()).map(({ version }) => version);
    const first = versions[0] ?? 0;
    expect(versions).toEqual(versions.map((_, i) => first + i));
    const { rows } = await a.admin.query<{ version: number }>(
      `select (data ->> 'version')::int as version from event where shop_id = $1 and type = 'PLAN_MADE' order by seq`,
      [shopId],
    );
    expect(rows.map(({ version }) => version)).toEqual(rows.map((_, i) => i + 1));
    // Nobody plans what is planned already: fewer plans than commands where commands come quickly.
    expect(versions.length).toBeLessThanOrEqual(last);
  });

  it('go on when the one that relays stops', async () => {
    const third = await startApiServer({}, { database });
    await third.stop();
    await until(
      'one relays',
      () => holders(RELAY_LOCK),
      (pids) => pids.length === 1,
    );
    await plannedUpTo(await command(a));
  });

  it('deliver, relay and plan after every connection of theirs was ended, again and again', async () => {
    const followers = await Promise.all([
      follow(a, owner.caller),
      follow(b, owner.caller.at(b.url)),
    ]);
    // More often than a pool has connections, so that one that is not given back would be missed.
    for (let round = 0; round < 4; round++) {
      await endConnections('relay');
      await endConnections('work');
      const seq = await command(round % 2 ? a : b);
      for (const follower of followers) await follower.reached(seq);
      await plannedUpTo(seq);
    }
    for (const follower of followers) {
      const seqs = follower.seqs();
      expect(seqs).toEqual([...new Set(seqs)].sort((x, y) => x - y));
      await follower.end();
    }
    expect(await holders(RELAY_LOCK)).toHaveLength(1);
    await until(
      'each worker has its lock again',
      () => holders(WORKER_LOCK),
      (pids) => pids.length === 2,
    );
  });

  it('answer on after connections of requests were ended', async () => {
    await endConnections('shop');
    await endConnections('entry');
    for (const server of [a, b]) {
      await until(
        'it answers',
        async () => (await owner.caller.at(server.url).ask('{ viewer { email } }')).codes,
        (codes) => codes.length === 0,
      );
    }
  });
});

describe('sockets close on both servers at once', () => {
  const onBoth = (open: (server: ApiServer) => Promise<{ closed: Promise<number> }>) =>
    Promise.all([open(a), open(b)]);
  const codes = (sockets: { closed: Promise<number> }[]) =>
    Promise.all(sockets.map(({ closed }) => closed));

  it('when a session ends, whichever server is told', async () => {
    for (const told of [a, b]) {
      const person = await newMember(a, owner, ['HELPER']);
      const sockets = await onBoth((server) => follow(server, person.caller.at(server.url)));
      await person.caller.at(told.url).get('mutation { signOut }');
      expect(await codes(sockets)).toEqual([4403, 4403]);
    }
  });

  it('when a screen is revoked, and nothing opens with its token any more', async () => {
    const display = await newScreen(a, owner);
    const sockets = await onBoth((server) => follow(server, display.at(server.url)));
    const { screens } = await owner.caller.get<{ screens: { id: string }[] }>('{ screens { id } }');
    await owner.caller
      .at(b.url)
      .get('mutation ($id: ID!) { revokeScreen(id: $id) { problems { code } } }', {
        id: screens[0]?.id,
      });
    expect(await codes(sockets)).toEqual([4403, 4403]);
    for (const server of [a, b]) {
      const again = subscribe(server, display, 'subscription { heartbeat }');
      expect(await again.first).toEqual({ kind: 'CLOSED', code: 4403 });
    }
  });

  it('when a key is revoked', async () => {
    const program = await newClient(a, owner, ['ORDERS_READ']);
    const sockets = await onBoth((server) => openSocket(server, program));
    const { apiKeys } = await owner.caller.get<{ apiKeys: { id: string }[] }>('{ apiKeys { id } }');
    await owner.caller
      .at(b.url)
      .get('mutation ($id: ID!) { revokeApiKey(id: $id) { problems { code } } }', {
        id: apiKeys[0]?.id,
      });
    expect(await codes(sockets)).toEqual([4403, 4403]);
  });
});

describe('the Floor is told', () => {
  it('to nobody whose role does not see it, nor to programs', async () => {
    const office = await newMember(a, owner, ['OFFICE']);
    const integrator = await newMember(a, owner, ['INTEGRATOR']);
    const program = await newClient(a, owner, ['ORDERS_READ', 'CUSTOMERS_READ']);
    for (const caller of [office.caller, integrator.caller, program]) {
      const subscription = subscribe(a, caller, 'subscription { floorChanges { cursor } }');
      expect(await subscription.first).toEqual({ kind: 'ERRORS', codes: ['FORBIDDEN'] });
      await subscription.end();
    }
  });

  it('to screens without customers, which nothing on the Floor leads to', async () => {
    const display = await newScreen(a, owner);
    const follower = await follow(b, display.at(b.url));
    const order = await newOrder(owner.caller, {
      customerName: 'Nell Farrow',
      lines: [{ designId, count: 2 }],
    });
    await makeBatch(owner.caller, { designId, boards: 2, orderLineIds: [order.lines[0]?.id] });
    await follower.reached(await command(a));
    expect(follower.messages.length).toBeGreaterThan(0);
    expect(JSON.stringify(follower.messages)).not.toMatch(/Farrow|customer/i);
    await follower.end();
    for (const query of [
      '{ orders { nodes { code } } }',
      `{ order(code: "${order.code}") { code } }`,
    ]) {
      expect((await display.ask(query)).codes).toEqual(['FORBIDDEN']);
    }
    const reached = [...typesBelow('FloorChange'), ...typesBelow('Floor')];
    expect(reached).toContain('Batch');
    expect(reached.filter((name) => /Customer|Order|Money|Price/.test(name))).toEqual([]);
  });
});

/** The names of all object types that a client can ask for below one. */
function typesBelow(name: string): Set<string> {
  const folder = path.join(repository, 'schema');
  const files = readdirSync(folder).map((file) => readFileSync(path.join(folder, file), 'utf8'));
  const schema = buildSchema(files.join('\n'));
  const found = new Set<string>();
  const walk = (type: GraphQLObjectType) => {
    if (found.has(type.name)) return;
    found.add(type.name);
    for (const field of Object.values(type.getFields())) {
      const below = getNamedType(field.type);
      if (isObjectType(below)) walk(below);
    }
  };
  walk(schema.getType(name) as GraphQLObjectType);
  return found;
}
