import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { newClient, newMember, newOwner, type Person } from '../factories/people';
import { newBatch, newDesign, newOrder, tryMove } from '../factories/things';

let server: ApiServer;
let owner: Person;
beforeAll(async () => {
  server = await startApiServer();
  owner = await newOwner(server);
});
afterAll(() => server.stop());

const CREATE = `mutation ($name: String!, $scopes: [ApiScope!]!, $days: Int) {
  createApiKey(name: $name, scopes: $scopes, expiresInDays: $days) {
    apiKey { id name prefix lastFour scopes expiresAt revokedAt } key problems { code field sentence }
  }
}`;
const REVOKE = `mutation ($id: ID!) {
  revokeApiKey(id: $id) { apiKey { id revokedAt } problems { code field } }
}`;

interface Created {
  createApiKey: {
    apiKey: { id: string; lastFour: string; expiresAt: string | null };
    key: string;
    problems: unknown[];
  };
}

describe('an API key', () => {
  it('is shown once, kept as a hash, and reads an order with its status, stage and progress', async () => {
    const integrator = await newMember(server, owner, ['INTEGRATOR']);
    const { createApiKey } = await integrator.caller.get<Created>(CREATE, {
      name: ' Books ',
      scopes: ['ORDERS_READ'],
    });
    const { key, apiKey } = createApiKey;
    expect(key).toMatch(/^ctide_[0-9A-Za-z]{38}$/);
    expect(apiKey).toMatchObject({
      name: 'Books',
      prefix: key.slice(0, 10),
      lastFour: key.slice(-4),
      scopes: ['ORDERS_READ'],
      expiresAt: null,
    });
    const { rows } = await server.admin.query<{ row: string }>(
      'select k::text as row from api_key k',
    );
    for (const { row } of rows) expect(row).not.toContain(key.slice(10, 40));

    const designId = await newDesign(owner.caller);
    const order = await newOrder(owner.caller, {
      clientReference: 'PO 77',
      lines: [{ designId, count: 8 }],
    });
    const program = server.stranger();
    program.bearer = key;
    const READ = `query ($code: String!) {
      order(code: $code) {
        code clientReference status stage progressPercent forecastReadyAt customer { name }
        lines { designName count status batchCodes }
      }
    }`;
    expect(await program.get(READ, { code: order.code })).toMatchObject({
      order: { clientReference: 'PO 77', status: 'RECEIVED', stage: null, customer: null },
    });
    const batch = await newBatch(owner.caller, {
      designId,
      boards: 8,
      orderLineIds: [order.lines[0]?.id],
    });
    await tryMove(owner.caller, batch, 'BLANK');
    expect(await program.get(READ, { code: order.code })).toMatchObject({
      order: {
        status: 'IN_WORK',
        stage: 'BLANK',
        progressPercent: 0,
        lines: [{ count: 8, status: 'IN_WORK', batchCodes: [batch.code] }],
      },
    });
    expect(await program.get('{ orders(first: 1) { totalCount nodes { code } } }')).toEqual({
      orders: { totalCount: 1, nodes: [{ code: order.code }] },
    });
  });

  it('shows customers to those that may see them', async () => {
    const designId = await newDesign(owner.caller);
    const order = await newOrder(owner.caller, { lines: [{ designId, count: 1 }] });
    const READ = 'query ($code: String!) { order(code: $code) { customer { name } } }';
    const blind = await newClient(server, owner, ['ORDERS_READ']);
    const seeing = await newClient(server, owner, ['ORDERS_READ', 'CUSTOMERS_READ']);
    const only = await newClient(server, owner, ['CUSTOMERS_READ']);
    expect(await blind.get(READ, order as never)).toEqual({ order: { customer: null } });
    expect(await seeing.get(READ, order as never)).toEqual({
      order: { customer: { name: 'Nell Farrow' } },
    });
    expect((await only.ask(READ, order as never)).codes).toEqual(['FORBIDDEN']);
  });

  it('ends at once when it is revoked, and stays in the list', async () => {
    const program = await newClient(server, owner, ['ORDERS_READ']);
    const { apiKeys } = await owner.caller.get<{ apiKeys: { id: string; revokedAt: unknown }[] }>(
      '{ apiKeys { id revokedAt } }',
    );
    const id = apiKeys[0]?.id;
    expect((await program.ask('{ orders { totalCount } }')).codes).toEqual([]);
    const { revokeApiKey } = await owner.caller.get<{
      revokeApiKey: { apiKey: { revokedAt: string } };
    }>(REVOKE, { id });
    expect(revokeApiKey.apiKey.revokedAt).toMatch(/Z$/);
    expect((await program.ask('{ orders { totalCount } }')).codes).toEqual(['UNAUTHENTICATED']);
    expect(await owner.caller.get(REVOKE, { id })).toMatchObject({
      revokeApiKey: { problems: [{ code: 'NOT_FOUND', field: 'id' }] },
    });
    const after = await owner.caller.get<{ apiKeys: unknown[] }>('{ apiKeys { id } }');
    expect(after.apiKeys).toHaveLength(apiKeys.length);
  });

  it('ends when it runs out', async () => {
    const { createApiKey } = await owner.caller.get<Created>(CREATE, {
      name: 'Short',
      scopes: ['ORDERS_READ'],
      days: 1,
    });
    const program = server.stranger();
    program.bearer = createApiKey.key;
    const hours = (Date.parse(createApiKey.apiKey.expiresAt ?? '') - Date.now()) / 3_600_000;
    expect(Math.round(hours)).toBe(24);
    expect((await program.ask('{ orders { totalCount } }')).codes).toEqual([]);
    await server.admin.query(`update api_key set expires_at = now() where name = 'Short'`);
    expect((await program.ask('{ orders { totalCount } }')).codes).toEqual(['UNAUTHENTICATED']);
  });

  it('is nobody when a character of it is wrong', async () => {
    const program = await newClient(server, owner, ['ORDERS_READ']);
    const key = program.bearer ?? '';
    const swapped = key.at(12) === 'a' ? 'b' : 'a';
    program.bearer = key.slice(0, 12) + swapped + key.slice(13);
    expect((await program.ask('{ orders { totalCount } }')).codes).toEqual(['UNAUTHENTICATED']);
  });

  it.each([
    ['an empty name', { name: '' }, 'name'],
    ['a name of 10,000 characters', { name: 'x'.repeat(10_000) }, 'name'],
    ['no scope', { scopes: [] }, 'scopes'],
    ['0 days', { days: 0 }, 'expiresInDays'],
    ['-1 days', { days: -1 }, 'expiresInDays'],
    ['731 days', { days: 731 }, 'expiresInDays'],
  ])('is not made with %s', async (_, changes, field) => {
    const { createApiKey } = await owner.caller.get<Created>(CREATE, {
      name: 'Books',
      scopes: ['ORDERS_READ'],
      ...changes,
    });
    expect(createApiKey).toMatchObject({
      apiKey: null,
      key: null,
      problems: [{ code: 'INVALID_INPUT', field }],
    });
  });
});
