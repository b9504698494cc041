import { and, eq } from 'drizzle-orm';
import { member } from '#drizzle/tables/member';
import { judge } from '#shared/floor/judge';
import type { BatchPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { runFloorCommand } from './command';
import { notFound } from './not-found';

/** Gives a batch to a person of the shop, or to no one. */
export async function assignBatch(
  context: Context,
  batchId: string,
  version: number,
  to: string | null,
): Promise<BatchPayload> {
  const { memberId, roles } = memberOf(context);
  const assignee = to === null ? null : localId('member', to);
  if (to !== null) {
    if (assignee === null) return notFound('memberId');
    const known = await context.read((tx) =>
      tx
        .select({ id: member.id })
        .from(member)
        .where(and(eq(member.id, assignee), eq(member.active, true))),
    );
    if (known.length === 0) return notFound('memberId');
  }
  return runFloorCommand(context, {
    batchId,
    version,
    happenedAt: null,
    type: () => 'BATCH_ASSIGNED',
    reasons: { override: null, rework: null },
    judge: (view, { floor }) =>
      judge(view, floor, { kind: 'ASSIGN', memberId: assignee }, { memberId, roles }),
  });
}
