import { getNamedType, isObjectType, type GraphQLObjectType } from 'graphql';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ACCESS } from '#server/http/access';
import { makeSchema } from '#server/http/schema';
import { startApiServer, type ApiServer } from '../factories/api-server';
import type { Caller } from '../factories/caller';
import { minimalOperation } from '../factories/minimal-operation';
import {
  newClient,
  newMember,
  newOwner,
  newScreen,
  trySignIn,
  type Person,
} from '../factories/people';
import { subscribe } from '../factories/sockets';
import { newDesign, newOrder } from '../factories/things';

const WHO = {
  O: 'an owner',
  M: 'a maker',
  H: 'a helper',
  F: 'the office',
  I: 'an integrator',
  S: 'a screen',
  C: 'a client that reads orders',
  N: 'nobody',
} as const;
type Letter = keyof typeof WHO;
const LETTERS = Object.keys(WHO) as Letter[];
const MEMBERS = 'OMHFI';
const ALL = 'OMHFISCN';

/** Who may use which root field, as the shop's rules have it; written by hand, not from the table it is checked against. */
const MAY: Record<string, string> = {
  'Query.now': ALL,
  'Query.viewer': ALL,
  'Query.sessions': MEMBERS,
  'Query.members': MEMBERS,
  'Query.shop': `${MEMBERS}S`,
  'Query.designs': MEMBERS,
  'Query.batch': 'OMH',
  'Query.batchHistory': 'OMH',
  'Query.floor': 'OMHS',
  'Query.unseenOverrides': 'O',
  'Query.order': 'OMFC',
  'Query.orders': 'OMFC',
  'Query.screens': 'O',
  'Query.apiKeys': 'OI',
  'Query.plan': 'OMFS',
  'Mutation.ping': ALL,
  'Mutation.signUp': ALL,
  'Mutation.signIn': ALL,
  'Mutation.signOut': ALL,
  'Mutation.switchShop': MEMBERS,
  'Mutation.endSession': MEMBERS,
  'Mutation.endOtherSessions': MEMBERS,
  'Mutation.setHours': 'O',
  'Mutation.setClamps': 'O',
  'Mutation.createDesign': 'OM',
  'Mutation.createBatch': 'OM',
  'Mutation.startStep': 'OMH',
  'Mutation.finishStep': 'OMH',
  'Mutation.moveBatch': 'OMH',
  'Mutation.undoCommand': 'OMH',
  'Mutation.assignBatch': 'OMH',
  'Mutation.seeOverride': 'O',
  'Mutation.createOrder': 'OF',
  'Mutation.startPairing': ALL,
  'Mutation.pollPairing': ALL,
  'Mutation.pairScreen': 'O',
  'Mutation.revokeScreen': 'O',
  'Mutation.createApiKey': 'OI',
  'Mutation.revokeApiKey': 'OI',
  'Subscription.heartbeat': `${MEMBERS}S`,
  'Subscription.floorChanges': 'OMHS',
};

const schema = makeSchema();
const ROOTS = ['Query', 'Mutation', 'Subscription'] as const;
const rootFields = ROOTS.flatMap((root) =>
  Object.keys((schema.getType(root) as GraphQLObjectType).getFields()).map(
    (name) => `${root}.${name}`,
  ),
);

let server: ApiServer;
let owner: Person;
const callers = {} as Record<Letter, Caller>;
const emails = new Map<Letter, string>();
beforeAll(async () => {
  server = await startApiServer();
  owner = await newOwner(server);
  callers.O = owner.caller;
  emails.set('O', owner.email);
  const roles = { M: 'MAKER', H: 'HELPER', F: 'OFFICE', I: 'INTEGRATOR' } as const;
  for (const letter of ['M', 'H', 'F', 'I'] as const) {
    const member = await newMember(server, owner, [roles[letter]]);
    callers[letter] = member.caller;
    emails.set(letter, member.email);
  }
  callers.S = await newScreen(server, owner);
  callers.C = await newClient(server, owner, ['ORDERS_READ']);
  callers.N = server.stranger();
});
afterAll(() => server.stop());

describe('the access table', () => {
  it('covers every root field, as does this test', () => {
    expect(
      Object.keys(ACCESS)
        .filter((key) => ROOTS.some((root) => key.startsWith(`${root}.`)))
        .sort(),
    ).toEqual([...rootFields].sort());
    expect(Object.keys(MAY).sort()).toEqual([...rootFields].sort());
  });
});

const refusedAs = (letter: Letter) => (letter === 'N' ? 'UNAUTHENTICATED' : 'FORBIDDEN');

describe.each(LETTERS.map((letter) => [WHO[letter], letter] as const))('%s', (_, letter) => {
  const overHttp = rootFields.filter((coordinate) => !coordinate.startsWith('Subscription.'));

  it.each(overHttp)('%s', async (coordinate) => {
    const [root = '', name = ''] = coordinate.split('.');
    const field = (schema.getType(root) as GraphQLObjectType).getFields()[name];
    if (!field) throw new Error(`no field ${coordinate}`);
    const { query, variables } = minimalOperation(root === 'Query' ? 'query' : 'mutation', field);
    const { codes } = await callers[letter].ask(query, variables);
    const email = emails.get(letter);
    // Whoever signed out comes back for the fields that follow.
    if (name === 'signOut' && email) await trySignIn(callers[letter], email);
    expect(codes).toEqual(MAY[coordinate]?.includes(letter) ? [] : [refusedAs(letter)]);
  });

  it.each(rootFields.filter((coordinate) => coordinate.startsWith('Subscription.')))(
    '%s',
    async (coordinate) => {
      const query =
        coordinate === 'Subscription.heartbeat'
          ? 'subscription { heartbeat }'
          : 'subscription { floorChanges(after: "djE6MA") { cursor } }';
      const subscription = subscribe(server, callers[letter], query);
      const word = await subscription.first;
      await subscription.end();
      if (letter === 'N') expect(word).toEqual({ kind: 'CLOSED', code: 4403 });
      else if (MAY[coordinate]?.includes(letter)) expect(word.kind).toBe('NEXT');
      else expect(word).toEqual({ kind: 'ERRORS', codes: ['FORBIDDEN'] });
    },
  );
});

describe('customers', () => {
  it('cannot be reached from anything that a helper, a screen or nobody may read', () => {
    for (const letter of ['H', 'S', 'N'] as const) {
      const seen = new Set<string>();
      const walk = (type: unknown): void => {
        if (!isObjectType(type) || seen.has(type.name)) return;
        seen.add(type.name);
        for (const field of Object.values(type.getFields())) walk(getNamedType(field.type));
      };
      for (const coordinate of rootFields.filter((each) => MAY[each]?.includes(letter))) {
        const [root = '', name = ''] = coordinate.split('.');
        const field = (schema.getType(root) as GraphQLObjectType).getFields()[name];
        walk(field && getNamedType(field.type));
      }
      expect([...seen]).not.toContain('Customer');
      expect([...seen]).not.toContain('Order');
      expect([...seen]).not.toContain('ApiKey');
    }
  });

  it('are seen in an order by those who may, and are null for a client without the scope', async () => {
    const designId = await newDesign(owner.caller);
    const { code } = await newOrder(owner.caller, { lines: [{ designId, count: 1 }] });
    const READ = 'query ($code: String!) { order(code: $code) { code customer { name email } } }';
    for (const letter of ['O', 'M', 'F'] as const) {
      expect(await callers[letter].get(READ, { code })).toMatchObject({
        order: { customer: { name: 'Nell Farrow' } },
      });
    }
    expect(await callers.C.get(READ, { code })).toEqual({ order: { code, customer: null } });
  });
});

describe("members' hours", () => {
  it('are for members; a screen sees none', async () => {
    await server.admin.query(
      `update member set weekly = '[[{"from":480,"to":720}],[],[],[],[],[],[]]' where name = 'Member HELPER'`,
    );
    const READ = '{ floor { members { name weekly { fromMinute } } } }';
    interface Floor {
      floor: { members: { name: string; weekly: unknown }[] };
    }
    const weeklyOf = ({ floor }: Floor) =>
      floor.members.find((member) => member.name === 'Member HELPER')?.weekly;
    expect(weeklyOf(await callers.M.get<Floor>(READ))).toHaveLength(7);
    expect(weeklyOf(await callers.S.get<Floor>(READ))).toBeNull();
  });
});
