import { desc } from 'drizzle-orm';
import { plan } from '#drizzle/tables/plan';
import { formatInstant } from '#shared/time/instant';
import type { Resolvers } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';

export const planResolvers: Resolvers = {
  Query: {
    plan: (_source, _args, context) =>
      context.read(async (tx) => {
        const [latest] = await tx.select().from(plan).orderBy(desc(plan.version)).limit(1);
        if (!latest) return null;
        return {
          version: latest.version,
          madeAt: latest.madeAt.toISOString(),
          seq: latest.seq,
          steps: latest.steps.map((step) => ({
            batchId: globalId('batch', step.batchId),
            step: step.step,
            piece: step.piece,
            startAt: formatInstant(step.startAt),
            endAt: formatInstant(step.endAt),
            members: step.members.map((id) => globalId('member', id)),
            reason: step.reason,
          })),
          unplanned: latest.unplanned.map(({ batchId, reason }) => ({
            batchId: globalId('batch', batchId),
            reason,
          })),
        };
      }),
  },
};
