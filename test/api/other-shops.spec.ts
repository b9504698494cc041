import {
  getNamedType,
  isInputObjectType,
  type GraphQLInputType,
  type GraphQLObjectType,
} from 'graphql';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makeSchema } from '#server/http/schema';
import { startApiServer, type ApiServer } from '../factories/api-server';
import type { Caller } from '../factories/caller';
import { fullShop, type FullShop } from '../factories/full-shop';
import { inDays } from '../factories/things';
import { fingerprint } from '../factories/walls';

/* Every place where the API takes the name of something, filled with something of another shop. */

let server: ApiServer;
let mine: FullShop;
let theirs: FullShop;
beforeAll(async () => {
  server = await startApiServer();
  mine = await fullShop(server, 'Alder Yard');
  theirs = await fullShop(server, 'Birch Yard');
  // So that codes of the other shop are none of this one.
  await server.admin.query(`update batch set code = 'BY-001' where shop_id = $1`, [theirs.id]);
  await server.admin.query(`update shop_order set code = 'OR-2001' where shop_id = $1`, [
    theirs.id,
  ]);
  theirs.batch.code = 'BY-001';
  theirs.order.code = 'OR-2001';
});
afterAll(() => server.stop());

const PROBLEMS = 'problems { code }';

/** One way of naming something: the operation with the name of `named`, everything else being of `own`. */
interface Way {
  operation(own: FullShop, named: FullShop): [query: string, variables: Record<string, unknown>];
  /** What the answer holds when the thing is not there; NOT_FOUND in its problems unless said otherwise. */
  missing?: unknown;
  /** Whether it changes what others use, and is therefore tried with the own name last or not at all. */
  ends?: true;
}

const step = (own: FullShop, named: FullShop) => ({
  batchId: named.batch.id,
  version: own.batch.version,
  step: 'mill',
  pieces: [0],
});

const WAYS: Record<string, Way> = {
  'Query.batch(code)': {
    operation: (_own, named) => [
      'query ($x: String!) { batch(code: $x) { id } }',
      { x: named.batch.code },
    ],
    missing: { batch: null },
  },
  'Query.batchHistory(batchId)': {
    operation: (_own, named) => [
      'query ($x: ID!) { batchHistory(batchId: $x) { nodes { seq } } }',
      { x: named.batch.id },
    ],
    missing: { batchHistory: { nodes: [] } },
  },
  'Query.order(code)': {
    operation: (_own, named) => [
      'query ($x: String!) { order(code: $x) { id } }',
      { x: named.order.code },
    ],
    missing: { order: null },
  },
  'Mutation.switchShop(shopId)': {
    operation: (_own, named) => [
      `mutation ($x: ID!) { switchShop(shopId: $x) { ${PROBLEMS} } }`,
      { x: named.owner.shopId },
    ],
  },
  'Mutation.endSession(id)': {
    operation: (_own, named) => [
      `mutation ($x: ID!) { endSession(id: $x) { ${PROBLEMS} } }`,
      { x: named.sessionId },
    ],
    ends: true,
  },
  'Mutation.createBatch(input.designId)': {
    operation: (_own, named) => [
      `mutation ($x: CreateBatchInput!) { createBatch(input: $x) { ${PROBLEMS} } }`,
      { x: { designId: named.designId, boards: 2 } },
    ],
  },
  'Mutation.createBatch(input.orderLineIds)': {
    operation: (own, named) => [
      `mutation ($x: CreateBatchInput!) { createBatch(input: $x) { ${PROBLEMS} } }`,
      { x: { designId: own.designId, boards: 2, orderLineIds: [named.order.lines[0]?.id] } },
    ],
  },
  'Mutation.startStep(input.batchId)': {
    operation: (own, named) => [
      `mutation ($x: StepCommandInput!) { startStep(input: $x) { ${PROBLEMS} } }`,
      { x: step(own, named) },
    ],
  },
  'Mutation.finishStep(input.batchId)': {
    operation: (own, named) => [
      `mutation ($x: StepCommandInput!) { finishStep(input: $x) { ${PROBLEMS} } }`,
      { x: step(own, named) },
    ],
  },
  'Mutation.moveBatch(input.batchId)': {
    operation: (own, named) => [
      `mutation ($x: MoveBatchInput!) { moveBatch(input: $x) { ${PROBLEMS} } }`,
      { x: { batchId: named.batch.id, version: own.batch.version, to: 'FIRST_GLUE_UP' } },
    ],
  },
  'Mutation.undoCommand(batchId)': {
    operation: (_own, named) => [
      `mutation ($x: ID!, $event: Int!) { undoCommand(batchId: $x, event: $event) { ${PROBLEMS} } }`,
      { x: named.batch.id, event: named.event },
    ],
  },
  'Mutation.assignBatch(batchId)': {
    operation: (own, named) => [
      `mutation ($x: ID!, $v: Int!, $m: ID) { assignBatch(batchId: $x, version: $v, memberId: $m) { ${PROBLEMS} } }`,
      { x: named.batch.id, v: own.batch.version, m: own.owner.memberId },
    ],
  },
  'Mutation.assignBatch(memberId)': {
    operation: (own, named) => [
      `mutation ($x: ID!, $v: Int!, $m: ID) { assignBatch(batchId: $x, version: $v, memberId: $m) { ${PROBLEMS} } }`,
      { x: own.batch.id, v: own.batch.version, m: named.owner.memberId },
    ],
  },
  'Mutation.seeOverride(id)': {
    operation: (_own, named) => [
      'mutation ($x: ID!) { seeOverride(id: $x) }',
      { x: named.overrideId },
    ],
    missing: { seeOverride: false },
  },
  'Mutation.createOrder(input.lines.designId)': {
    operation: (_own, named) => [
      `mutation ($x: CreateOrderInput!) { createOrder(input: $x) { ${PROBLEMS} } }`,
      {
        x: {
          customerName: 'Nell Farrow',
          dueDate: inDays(20),
          lines: [{ designId: named.designId, count: 1 }],
        },
      },
    ],
  },
  'Mutation.revokeScreen(id)': {
    operation: (_own, named) => [
      `mutation ($x: ID!) { revokeScreen(id: $x) { ${PROBLEMS} } }`,
      { x: named.screenId },
    ],
  },
  'Mutation.revokeApiKey(id)': {
    operation: (_own, named) => [
      `mutation ($x: ID!) { revokeApiKey(id: $x) { ${PROBLEMS} } }`,
      { x: named.keyId },
    ],
  },
};

/** Names that are no rows of a shop: a display's code and secret come from no shop yet, clamps' keys are tried elsewhere. */
const NO_ROWS_OF_A_SHOP = ['Mutation.pairScreen(code)'];

/** Every argument and input field of the schema whose type is ID, and every `code`. */
function namesInSchema(): string[] {
  const schema = makeSchema();
  const found: string[] = [];
  const walk = (coordinate: string, path: string, type: GraphQLInputType): void => {
    const named = getNamedType(type);
    if (isInputObjectType(named)) {
      for (const field of Object.values(named.getFields())) {
        walk(coordinate, `${path}.${field.name}`, field.type);
      }
    } else if (named.name === 'ID' || /(^|\.)code$/.test(path)) {
      found.push(`${coordinate}(${path})`);
    }
  };
  for (const root of ['Query', 'Mutation', 'Subscription']) {
    const fields = (schema.getType(root) as GraphQLObjectType).getFields();
    for (const field of Object.values(fields)) {
      for (const arg of field.args) walk(`${root}.${field.name}`, arg.name, arg.type);
    }
  }
  return found;
}

async function isMissing(caller: Caller, way: Way, own: FullShop, named: FullShop) {
  const { data, codes } = await caller.ask(...way.operation(own, named));
  expect(codes).toEqual([]);
  if (way.missing !== undefined) return JSON.stringify(data) === JSON.stringify(way.missing);
  const [payload] = Object.values(data ?? {}) as { problems: { code: string }[] }[];
  return payload?.problems.some((problem) => problem.code === 'NOT_FOUND') ?? false;
}

describe('what is of another shop', () => {
  it('is tried wherever the schema takes a name', () => {
    expect([...Object.keys(WAYS), ...NO_ROWS_OF_A_SHOP].sort()).toEqual(namesInSchema().sort());
  });

  it.each(Object.entries(WAYS))('is not there for %s, and stays as it is', async (_, way) => {
    const before = await fingerprint(server.admin, theirs.id);
    expect(await isMissing(mine.owner.caller, way, mine, theirs)).toBe(true);
    expect(await fingerprint(server.admin, theirs.id)).toBe(before);
    expect(await theirs.owner.caller.get('{ viewer { email } }')).toEqual({
      viewer: { email: theirs.owner.email },
    });
  });

  it.each(Object.entries(WAYS).filter(([, way]) => !way.ends))(
    'is there for its own people, so that "not there" means something: %s',
    async (_, way) => {
      expect(await isMissing(theirs.owner.caller, way, theirs, theirs)).toBe(false);
    },
  );

  it('is in no list and no floor', async () => {
    const answer = JSON.stringify(
      await mine.owner.caller.get(`{
        designs { id } members { id } orders { nodes { id customer { id } lines { id } } }
        screens { id } apiKeys { id } sessions { id } unseenOverrides { override { id } }
        floor { shop { id } members { id } designs { id } routes { id } batches { id designId routeId } }
      }`),
    );
    expect(answer).toContain(mine.batch.id);
    for (const id of [
      theirs.owner.shopId,
      theirs.owner.memberId,
      theirs.designId,
      theirs.order.id,
      theirs.batch.id,
      theirs.overrideId,
      theirs.screenId,
      theirs.keyId,
      theirs.sessionId,
    ]) {
      expect(id).toMatch(/^[a-z]+_[0-9a-f]{32}$/);
      expect(answer).not.toContain(id);
    }
  });
});
