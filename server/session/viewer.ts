import { eq } from 'drizzle-orm';
import type { NodePgDatabase } from 'drizzle-orm/node-postgres';
import { member } from '#drizzle/tables/member';
import { ROLES, type Role } from '#shared/members/permissions';
import type { ShopMembership, Viewer } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';
import type { Services } from '#server/http/services';
import { presentMember } from '#server/members/present';
import { readShop } from '#server/shop/read-shop';

/** A shop that a person belongs to, and as whom. */
export interface Membership {
  shopId: string;
  name: string;
  memberId: string;
  roles: Role[];
}

/** All shops that a person belongs to, by name. */
export async function membershipsOf(services: Services, personId: string): Promise<Membership[]> {
  const rows = await services.doors.entry<{
    shop_id: string;
    name: string;
    member_id: string;
    roles: string[];
  }>('select * from entry.shops_of($1)', [personId]);
  return rows.map((row) => ({
    shopId: row.shop_id,
    name: row.name,
    memberId: row.member_id,
    roles: ROLES.filter((role) => row.roles.includes(role)),
  }));
}

/** The person as the API shows them, read inside the shop that they look at. */
export async function readViewer(
  tx: NodePgDatabase,
  person: { email: string; memberId: string },
  memberships: readonly Membership[],
): Promise<Viewer> {
  const [row] = await tx.select().from(member).where(eq(member.id, person.memberId));
  if (!row) throw new Error('The member is gone.');
  return {
    email: person.email,
    member: presentMember(row),
    shop: await readShop(tx),
    shops: memberships.map(({ shopId, name, roles }): ShopMembership => ({
      shopId: globalId('shop', shopId),
      name,
      roles,
    })),
  };
}
