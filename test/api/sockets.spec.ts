import { once } from 'node:events';
import WebSocket from 'ws';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { newMember, newOwner, newScreen, trySignIn, type Person } from '../factories/people';
import { subscribe } from '../factories/sockets';

let server: ApiServer;
let owner: Person;
beforeAll(async () => {
  server = await startApiServer();
  owner = await newOwner(server);
});
afterAll(() => server.stop());

const FLOOR = 'subscription { floorChanges { cursor } }';
const BEAT = 'subscription { heartbeat }';

/** A socket that speaks by hand. */
async function open(headers: Record<string, string>) {
  const socket = new WebSocket(
    `${server.url.replace('http', 'ws')}/graphql`,
    'graphql-transport-ws',
    {
      headers,
    },
  );
  const messages: string[] = [];
  socket.on('message', (data: Buffer) => messages.push(data.toString()));
  const closed = new Promise<number>((resolve) => socket.on('close', resolve));
  socket.on('error', () => undefined);
  await once(socket, 'open');
  return { socket, messages, closed };
}

describe('sockets close at once', () => {
  it('when their session ends, on every way in which it can', async () => {
    const ends: ((person: Person) => Promise<unknown>)[] = [
      ({ caller }) => caller.get('mutation { signOut }'),
      async ({ email }) => {
        const other = server.stranger();
        await trySignIn(other, email);
        await other.get('mutation { endOtherSessions { problems { code } } }');
      },
      async ({ caller }) => {
        const { sessions } = await caller.get<{ sessions: { id: string }[] }>(
          '{ sessions { id } }',
        );
        await caller.get('mutation ($id: ID!) { endSession(id: $id) { problems { code } } }', {
          id: sessions[0]?.id,
        });
      },
    ];
    for (const end of ends) {
      const person = await newOwner(server);
      const subscription = subscribe(server, person.caller, BEAT);
      expect((await subscription.first).kind).toBe('NEXT');
      await end(person);
      expect(await subscription.closed).toBe(4403);
    }
  });

  it('when the session turns to another shop, so that they open there', async () => {
    const other = await newOwner(server);
    const { caller } = await newMember(server, owner, ['MAKER'], other.email);
    const subscription = subscribe(server, caller, BEAT);
    await subscription.first;
    const { viewer } = await caller.get<{ viewer: { shop: { id: string } } }>(
      '{ viewer { shop { id } } }',
    );
    const to = viewer.shop.id === owner.shopId ? other.shopId : owner.shopId;
    await caller.get('mutation ($x: ID!) { switchShop(shopId: $x) { problems { code } } }', {
      x: to,
    });
    expect(await subscription.closed).toBe(4403);
  });

  it('when their screen is revoked', async () => {
    const display = await newScreen(server, owner);
    const subscription = subscribe(server, display, BEAT);
    expect((await subscription.first).kind).toBe('NEXT');
    const { screens } = await owner.caller.get<{ screens: { id: string }[] }>('{ screens { id } }');
    await owner.caller.get('mutation ($x: ID!) { revokeScreen(id: $x) { problems { code } } }', {
      x: screens[0]?.id,
    });
    expect(await subscription.closed).toBe(4403);
  });
});

describe('sockets refuse', () => {
  it.each([
    ['a mutation', 'mutation { ping }'],
    ['a query', '{ now }'],
    ['a question about the schema', '{ __schema { types { name } } }'],
  ])('%s', async (_, query) => {
    const subscription = subscribe(server, owner.caller, query);
    expect(await subscription.first).toEqual({ kind: 'ERRORS', codes: ['SUBSCRIPTIONS_ONLY'] });
    await subscription.end();
  });

  it('documents beyond the limits, in the same words as HTTP', async () => {
    const aliases = Array.from({ length: 30 }, (_, n) => `a${n}: cursor`).join(' ');
    const subscription = subscribe(
      server,
      owner.caller,
      `subscription { floorChanges { ${aliases} } }`,
    );
    const word = await subscription.first;
    expect(word).toEqual({
      kind: 'ERRORS',
      codes: ['The document has more than 20 aliases: ask for less at once.'],
    });
    await subscription.end();
  });

  it('to say what else there is', async () => {
    const subscription = subscribe(server, owner.caller, 'subscription { floorChange { cursor } }');
    const word = await subscription.first;
    expect(word.kind).toBe('ERRORS');
    expect(JSON.stringify(word)).not.toMatch(/did you mean/i);
    await subscription.end();
  });

  it('a cursor that was made up', async () => {
    const subscription = subscribe(
      server,
      owner.caller,
      'subscription { floorChanges(after: "x") { cursor } }',
    );
    expect(await subscription.first).toEqual({ kind: 'ERRORS', codes: ['BAD_USER_INPUT'] });
    await subscription.end();
  });

  it('a frame of 10 MB, and go on for everyone else', async () => {
    const neighbour = subscribe(server, owner.caller, BEAT);
    await neighbour.first;
    const { socket, closed } = await open({ Cookie: owner.caller.cookieHeader ?? '' });
    socket.send('x'.repeat(10 * 1024 * 1024));
    expect(await closed).toBe(1009);
    const after = subscribe(server, owner.caller, BEAT);
    expect((await after.first).kind).toBe('NEXT');
    await Promise.all([neighbour.end(), after.end()]);
  });

  it.each([
    ['that is no JSON', 'x', 4400],
    ['of an unknown kind', '{"type":"x"}', 4400],
    [
      'before it said who it is',
      `{"id":"1","type":"subscribe","payload":{"query":"${FLOOR}"}}`,
      4401,
    ],
  ])('a message %s', async (_, message, code) => {
    const { socket, closed } = await open({ Cookie: owner.caller.cookieHeader ?? '' });
    socket.send(message);
    expect(await closed).toBe(code);
  });

  it('pages of other sites, before anything is said', async () => {
    const from = (origin: string) =>
      open({ Cookie: owner.caller.cookieHeader ?? '', Origin: origin }).then(
        ({ socket }) => {
          socket.close();
          return 'open';
        },
        (error: Error) => error.message,
      );
    expect(await from('https://elsewhere.example.com')).toMatch(/403/);
    expect(await from('null')).toMatch(/403/);
    expect(await from(server.settings.publicUrl)).toBe('open');
  });

  it('whoever has no session or key', async () => {
    expect(await subscribe(server, server.stranger(), BEAT).first).toEqual({
      kind: 'CLOSED',
      code: 4403,
    });
  });
});
