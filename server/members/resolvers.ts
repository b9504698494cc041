import { asc, eq } from 'drizzle-orm';
import { member } from '#drizzle/tables/member';
import type { Resolvers } from '#server/generated/schema';
import { presentMember } from './present';

export const memberResolvers: Resolvers = {
  Query: {
    members: (_source, _args, context) =>
      context.read(async (tx) => {
        const rows = await tx
          .select()
          .from(member)
          .where(eq(member.active, true))
          .orderBy(asc(member.name), asc(member.id));
        return rows.map(presentMember);
      }),
  },
};
