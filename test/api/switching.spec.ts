import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApiServer, type ApiServer } from '../factories/api-server';
import { newMember, newOwner, type Person } from '../factories/people';
import { newDesign } from '../factories/things';

let server: ApiServer;
let first: Person;
let second: Person;
beforeAll(async () => {
  server = await startApiServer();
  first = await newOwner(server, { shopName: 'Alder Yard' });
  second = await newOwner(server, { shopName: 'Birch Yard' });
});
afterAll(() => server.stop());

const SWITCH = `mutation ($shopId: ID!) {
  switchShop(shopId: $shopId) {
    viewer { email member { roles } shop { id name } shops { name roles } }
    problems { code field }
  }
}`;

describe('a person in two shops', () => {
  it('signs in to one, sees both, and turns the session to the other with the roles held there', async () => {
    await newDesign(second.caller, { name: 'Only in Birch Yard' });
    const { caller, email } = await newMember(server, first, ['OFFICE'], second.email);
    expect(await caller.get('{ viewer { shop { name } shops { name roles } } }')).toEqual({
      viewer: {
        shop: { name: 'Alder Yard' },
        shops: [
          { name: 'Alder Yard', roles: ['OFFICE'] },
          { name: 'Birch Yard', roles: ['OWNER'] },
        ],
      },
    });
    expect(await caller.get('{ designs { name } }')).toEqual({ designs: [] });
    expect((await caller.ask('{ floor { cursor } }')).codes).toEqual(['FORBIDDEN']);

    expect(await caller.get(SWITCH, { shopId: second.shopId })).toMatchObject({
      switchShop: {
        viewer: {
          email,
          member: { roles: ['OWNER'] },
          shop: { id: second.shopId, name: 'Birch Yard' },
        },
        problems: [],
      },
    });
    expect(await caller.get('{ designs { name } }')).toEqual({
      designs: [{ name: 'Only in Birch Yard' }],
    });
    expect((await caller.ask('{ floor { cursor } }')).codes).toEqual([]);
  });

  it('does not get into a shop of others', async () => {
    const third = await newOwner(server);
    for (const shopId of [first.shopId, 'shop_1', 'x'.repeat(10_000), first.memberId]) {
      expect(await third.caller.get(SWITCH, { shopId })).toEqual({
        switchShop: { viewer: null, problems: [{ code: 'NOT_FOUND', field: 'shopId' }] },
      });
    }
    expect(await third.caller.get('{ viewer { shop { id } } }')).toEqual({
      viewer: { shop: { id: third.shopId } },
    });
  });

  it('is out of a shop at once when the membership ends', async () => {
    const { caller, memberId } = await newMember(server, first, ['MAKER']);
    await server.admin.query(
      'update member set active = false where replace(id::text, $1, $2) = $3',
      ['-', '', memberId.replace('member_', '')],
    );
    expect(await caller.get('{ viewer { email } }')).toEqual({ viewer: null });
    expect((await caller.ask('{ designs { name } }')).codes).toEqual(['UNAUTHENTICATED']);
  });
});
