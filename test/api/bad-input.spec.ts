import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { fullShop, type FullShop } from '../factories/full-shop';
import { trySignIn, PASSWORD } from '../factories/people';
import { tryMove } from '../factories/things';
import { fingerprint } from '../factories/walls';

/* What no client of ours sends: each gets a code and a sentence, and nothing is lost or half written. */

let server: ApiServer;
let shop: FullShop;
beforeAll(async () => {
  server = await startApiServer();
  shop = await fullShop(server, 'Alder Yard');
});
afterAll(() => server.stop());

/** Sends a body and looks that what comes back is an error with a code and words, and no stack. */
async function refusalOf(body: string | object, headers: Record<string, string> = {}) {
  const response = await shop.owner.caller.post(body, headers);
  const { errors } = response.body as {
    errors?: { message: string; extensions: { code: string } }[];
  };
  expect(errors?.length).toBeGreaterThan(0);
  expect(errors?.[0]?.message.length).toBeGreaterThan(5);
  expect(response.text).not.toMatch(/node_modules|\.ts:|at \w+ \(/);
  return { status: response.status, code: errors?.[0]?.extensions?.code };
}

describe('bodies', () => {
  it.each<[string, string, number]>([
    ['that are not JSON', '{"query": ', 400],
    ['that are empty', '', 400],
    ['that are a number', '5', 400],
    ['that are a string', '"{ now }"', 400],
    ['that are null', 'null', 400],
    ['that are a list', '[{"query":"{ now }"}]', 400],
    ['without a query', '{}', 400],
    ['whose query is a number', '{"query": 5}', 400],
    ['whose query is empty', '{"query": ""}', 400],
    ['whose variables are a list', '{"query": "{ now }", "variables": []}', 400],
    ['whose variables are text', '{"query": "{ now }", "variables": "x"}', 400],
    ['whose operation is not there', '{"query": "query A { now }", "operationName": "B"}', 400],
  ])('%s are refused', async (_, body, status) => {
    expect((await refusalOf(body)).status).toBe(status);
  });

  it('of more than 64 kB are refused before they are read', async () => {
    const query = `{ now } # ${'x'.repeat(10 * 1024 * 1024)}`;
    expect(await refusalOf({ query })).toEqual({ status: 413, code: 'TOO_LARGE' });
  });

  it.each(['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data'])(
    'sent as %s, as forms of other sites can, are refused',
    async (type) => {
      const response = await shop.owner.caller.post('{"query":"{ now }"}', {
        'Content-Type': type,
      });
      expect(response.status).toBe(400);
      expect(response.text).not.toContain('"data"');
    },
  );

  it('in an unknown encoding or character set are refused', async () => {
    expect((await refusalOf('{}', { 'Content-Encoding': 'x' })).status).toBe(415);
    const odd = { 'Content-Type': 'application/json; charset=x' };
    expect((await refusalOf('{}', odd)).status).toBe(415);
  });

  it('that were good before are still answered', async () => {
    expect(await shop.owner.caller.get('{ viewer { email } }')).toEqual({
      viewer: { email: shop.owner.email },
    });
  });
});

describe('other sites', () => {
  it.each<[string, Record<string, string>]>([
    ['an origin of their own', { Origin: 'https://elsewhere.example.com' }],
    ['no origin they tell', { Origin: 'null' }],
    ['an origin that only begins like ours', { Origin: 'http://localhost:4000.example.com' }],
    ['a browser that says so', { 'Sec-Fetch-Site': 'cross-site' }],
  ])('with %s may not speak with a session', async (_, headers) => {
    const response = await shop.owner.caller.post({ query: '{ viewer { email } }' }, headers);
    expect(response.status).toBe(403);
    expect(response.text).not.toContain(shop.owner.email);
    expect(response.headers['access-control-allow-origin']).toBeUndefined();
  });

  it('cannot ask by an address alone', async () => {
    const response = await request(server.url)
      .get('/graphql?query=%7Bviewer%7Bemail%7D%7D')
      .set('Cookie', shop.owner.caller.cookieHeader ?? '');
    expect(response.status).toBe(400);
    expect(response.text).not.toContain(shop.owner.email);
  });
});

describe('documents', () => {
  const nested = (depth: number) => {
    const open = '{ ofType '.repeat(depth);
    return `{ __type(name: "Query") { fields { type ${open} { name } ${'}'.repeat(depth)} } } }`;
  };

  it.each([
    ['too deep', nested(20)],
    [
      'with too many aliases',
      `{ ${Array.from({ length: 40 }, (_, n) => `a${n}: now`).join(' ')} }`,
    ],
    ['with too many tokens', `{ ${'now '.repeat(3_000)} }`],
    ['with too many directives', `{ now ${'@include(if: true) '.repeat(60)} }`],
    [
      'that go in circles',
      '{ ...A } fragment A on Query { now ...B } fragment B on Query { ...A }',
    ],
    [
      'too deep by fragments',
      `{ __type(name: "Query") { ...F0 } } ${Array.from(
        { length: 20 },
        (_, n) => `fragment F${n} on __Type { ofType { ...F${n + 1} } }`,
      ).join(' ')} fragment F20 on __Type { name }`,
    ],
  ])('%s are refused', async (_, query) => {
    const { status } = await refusalOf({ query });
    expect(status).toBe(400);
  });

  it('with a crowd of sign-ins are refused whole', async () => {
    const guess = (n: number) =>
      `a${n}: signIn(email: "x@example.com", password: "guess ${n}") { problems { code } }`;
    const query = `mutation { ${Array.from({ length: 30 }, (_, n) => guess(n)).join(' ')} }`;
    expect((await refusalOf({ query })).status).toBe(400);
    const { rows } = await server.admin.query('select from sign_in_failure');
    expect(rows).toHaveLength(0);
  });

  it('that are wrong say what is wrong, and do not guess what else there is', async () => {
    const { errors, codes } = await shop.owner.caller.ask('{ ordrs { nodes { code } } }');
    expect(codes).toEqual(['GRAPHQL_VALIDATION_FAILED']);
    expect(errors[0]?.message).not.toMatch(/did you mean/i);
  });

  it.each([
    ['of a number for text', 'query { order(code: 5) { code } }', {}],
    ['of text for a number', 'query { orders(first: "5") { totalCount } }', {}],
    [
      'of a fraction',
      'query ($first: Int) { orders(first: $first) { totalCount } }',
      { first: 1.5 },
    ],
    [
      'of a number that is too large',
      'query ($first: Int) { orders(first: $first) { totalCount } }',
      { first: 1e12 },
    ],
    ['that is missing', 'query ($code: String!) { order(code: $code) { code } }', {}],
    ['that is unknown', 'query ($code: String!) { order(code: $code) { code } }', { code: {} }],
    [
      'of a list for text',
      'query ($code: String!) { order(code: $code) { code } }',
      { code: ['a'] },
    ],
    [
      'of a date that is none',
      'mutation ($d: Date!) { createOrder(input: {customerName: "x", dueDate: $d, lines: []}) { problems { code } } }',
      { d: '2026-02-30' },
    ],
    [
      'of a length with a fraction',
      'mutation ($l: Length!) { setClamps(version: 1, clamps: [{length: $l, count: 1}]) { problems { code } } }',
      { l: '1.5' },
    ],
  ])('with a value %s are refused', async (_, query, variables) => {
    const { data, codes } = await shop.owner.caller.ask(query, variables);
    expect(data).toBeNull();
    expect(codes[0]).toMatch(/^(GRAPHQL_VALIDATION_FAILED|BAD_USER_INPUT)$/);
  });

  it.each([
    '{ __schema { types { name } } }',
    '{ __type(name: "Query") { name } }',
    '{ now ...F } fragment F on Query { __schema { types { name } } }',
    '{ ... on Query { __schema { types { name } } } }',
    '{ ... { a: __type(name: "Query") { name } } }',
    'mutation { ping ...F } fragment F on Mutation { ping } query Q { __typename }',
  ])('that ask a stranger’s question about the schema are refused: %s', async (query) => {
    const { codes, data } = await server.stranger().ask(query);
    expect(codes).toHaveLength(1);
    expect(JSON.stringify(data)).not.toContain('types');
  });

  it('about the schema are answered to whoever is known', async () => {
    const { codes } = await shop.owner.caller.ask('{ __schema { queryType { name } } }');
    expect(codes).toEqual([]);
  });
});

describe('texts', () => {
  const NUL = 'a\u0000b';

  it.each<[string, string, Record<string, unknown>]>([
    [
      'a customer',
      'mutation ($x: String!, $d: ID!) { createOrder(input: {customerName: $x, dueDate: "2031-01-01", lines: [{designId: $d, count: 1}]}) { problems { code } } }',
      {},
    ],
    [
      'a reference',
      'mutation ($x: String!, $d: ID!) { createOrder(input: {customerName: "x", clientReference: $x, dueDate: "2030-01-01", lines: [{designId: $d, count: 1}]}) { problems { code } } }',
      {},
    ],
    ['a batch’s code', 'query ($x: String!) { batch(code: $x) { code } }', {}],
    [
      'a reason',
      'mutation ($x: String!) { setHours(version: 1, weekly: [[],[],[],[],[],[],[]], exceptions: [{date: "2030-01-01", spans: [], reason: $x}]) { problems { code } } }',
      {},
    ],
    [
      'a key',
      'mutation ($x: String!, $d: ID!) { createBatch(input: {designId: $d, boards: 1, idempotencyKey: $x}) { problems { code } } }',
      {},
    ],
  ])('that cannot be stored are no fault of the server: %s', async (_, query) => {
    const before = await fingerprint(server.admin, shop.id);
    const used = query.includes('$d') ? { x: NUL, d: shop.designId } : { x: NUL };
    const { data, codes } = await shop.owner.caller.ask(query, used);
    expect(codes).not.toContain('INTERNAL_SERVER_ERROR');
    const [payload] = Object.values(data ?? {}) as ({ problems?: unknown[] } | null)[];
    // Nobody has such a code; everything else is refused in words or as bad input.
    if (payload) expect(payload.problems).not.toEqual([]);
    expect(await fingerprint(server.admin, shop.id)).toBe(before);
  });
});

describe('commands', () => {
  it('on a version that has passed are refused, with whose move it was, and write nothing', async () => {
    const before = await fingerprint(server.admin, shop.id);
    const old = { ...shop.batch, version: shop.batch.version - 1 };
    const answer = await tryMove(shop.owner.caller, old, 'FIRST_GLUE_UP');
    expect(answer.problems).toMatchObject([{ code: 'VERSION_CONFLICT', field: 'version' }]);
    expect(answer.problems[0]?.sentence).toContain('Ruth Amsel');
    expect(answer.batch).toMatchObject({ version: shop.batch.version, place: 'BLANK' });
    expect(await fingerprint(server.admin, shop.id)).toBe(before);
  });

  it.each([-1, 0, 2_147_483_647])('on version %i are refused', async (version) => {
    const { problems } = await tryMove(shop.owner.caller, { ...shop.batch, version }, 'SAND');
    expect(problems[0]?.code).toBe('VERSION_CONFLICT');
  });

  it('that drop a batch where it may not go are refused by the rules', async () => {
    const before = await fingerprint(server.admin, shop.id);
    for (const to of ['FINISH', 'SHIPPED', 'QUEUED']) {
      const { problems, batch } = await tryMove(shop.owner.caller, shop.batch, to);
      expect(problems).toHaveLength(1);
      expect(problems[0]?.sentence).toMatch(/\w+.*\.$/);
      expect(batch).toMatchObject({ version: shop.batch.version });
    }
    expect(await fingerprint(server.admin, shop.id)).toBe(before);
  });

  it('with absurd pieces, steps and times are refused', async () => {
    const before = await fingerprint(server.admin, shop.id);
    const base = { batchId: shop.batch.id, version: shop.batch.version, step: 'mill', pieces: [0] };
    for (const changes of [
      { step: 'no such step' },
      { step: 'x'.repeat(10_000) },
      { step: '' },
      { pieces: [] },
      { pieces: [-1] },
      { pieces: [2_147_483_647] },
      { pieces: Array.from({ length: 10_000 }, (_, n) => n) },
      { happenedAt: '1970-01-01T00:00:00Z' },
      { happenedAt: '9999-12-31T00:00:00Z' },
    ]) {
      const { data, codes } = await shop.owner.caller.ask(
        'mutation ($input: StepCommandInput!) { startStep(input: $input) { problems { code sentence } } }',
        { input: { ...base, ...changes } },
      );
      const refused = (data as { startStep?: { problems: unknown[] } } | null)?.startStep?.problems;
      expect([changes, refused?.length ?? codes.length]).toEqual([changes, 1]);
      expect(codes).not.toContain('INTERNAL_SERVER_ERROR');
    }
    expect(await fingerprint(server.admin, shop.id)).toBe(before);
  });

  it('of a stolen session end with it', async () => {
    const thief = shop.owner.caller.twin();
    const browser = server.stranger();
    await trySignIn(browser, shop.owner.email, PASSWORD);
    await browser.get('mutation { endOtherSessions { problems { code } } }');
    const answer = await thief.ask(
      'mutation { createApiKey(name: "x", scopes: [ORDERS_READ]) { key } }',
    );
    expect(answer.codes).toEqual(['UNAUTHENTICATED']);
    expect(answer.data).toBeNull();
  });
});
