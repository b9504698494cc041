import { desc } from 'drizzle-orm';
import { apiKey } from '#drizzle/tables/access';
import type { Resolvers } from '#server/generated/schema';
import { createApiKey } from './create-api-key';
import { presentKey } from './present-key';
import { revokeApiKey } from './revoke-api-key';

export const apiResolvers: Resolvers = {
  Query: {
    apiKeys: (_source, _args, context) =>
      context.read(async (tx) => {
        const rows = await tx
          .select()
          .from(apiKey)
          .orderBy(desc(apiKey.createdAt), desc(apiKey.id));
        return rows.map(presentKey);
      }),
  },
  Mutation: {
    createApiKey: (_source, args, context) => createApiKey(context, args),
    revokeApiKey: (_source, { id }, context) => revokeApiKey(context, id),
  },
};
