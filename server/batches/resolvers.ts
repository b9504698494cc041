import type { Resolvers } from '#server/generated/schema';
import { loadBatches } from '#server/floor/load';
import { presentBatch } from '#server/floor/present';
import { createBatch } from './create-batch';
import { batchHistory } from './history';

export const batchResolvers: Resolvers = {
  Query: {
    batch: (_source, { code }, context) =>
      context.read(async (tx) => {
        const now = context.services.now();
        const [loaded] = await loadBatches(tx, { codes: [code.slice(0, 40)] }, now);
        return loaded ? presentBatch(loaded, now) : null;
      }),
    batchHistory: (_source, { batchId, first, after }, context) =>
      batchHistory(context, batchId, first ?? 50, after ?? null),
  },
  Mutation: {
    createBatch: (_source, { input }, context) => createBatch(context, input),
  },
};
