import { and, asc, eq, isNull } from 'drizzle-orm';
import { batch, holdOverride, routeCopy } from '#drizzle/tables/batch';
import { member } from '#drizzle/tables/member';
import { stepAt } from '#shared/route/route';
import { overrideSentence } from '#shared/words/event-words';
import { appendEvent } from '#server/db/events';
import type { UnseenOverride } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { globalId, localId } from '#server/http/global-id';

/** Overrides that no owner has marked as seen, the oldest first. */
export function unseenOverrides(context: Context): Promise<UnseenOverride[]> {
  return context.read(async (tx) => {
    const rows = await tx
      .select({
        override: holdOverride,
        code: batch.code,
        steps: routeCopy.steps,
        routeId: routeCopy.id,
        name: member.name,
      })
      .from(holdOverride)
      .innerJoin(batch, eq(batch.id, holdOverride.batchId))
      .innerJoin(routeCopy, eq(routeCopy.id, batch.routeId))
      .leftJoin(member, eq(member.id, holdOverride.by))
      .where(isNull(holdOverride.seenAt))
      .orderBy(asc(holdOverride.at));
    return rows.map(({ override, code, steps, routeId, name }) => {
      const step = stepAt({ id: routeId, steps }, override.step)?.step;
      return {
        batchCode: code,
        override: {
          id: globalId('override', override.id),
          step: override.step,
          piece: override.piece,
          by: globalId('member', override.by),
          at: override.at.toISOString(),
          reason: override.reason,
          seen: false,
        },
        sentence: overrideSentence({
          batchCode: code,
          personName: name,
          hold: step?.kind === 'WAIT' ? step.hold : null,
          pieceKind: step?.scope ?? 'BATCH',
          piece: override.piece,
          reason: override.reason,
        }),
      };
    });
  });
}

/** Marks an override as seen. False when there is none such that was not seen before. */
export async function seeOverride(context: Context, id: string): Promise<boolean> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const overrideId = localId('override', id);
  if (overrideId === null) return false;
  const seen = await services.doors.inShop(shopId, async (tx) => {
    const now = services.now();
    const [row] = await tx
      .update(holdOverride)
      .set({ seenAt: now })
      .where(and(eq(holdOverride.id, overrideId), isNull(holdOverride.seenAt)))
      .returning({ batchId: holdOverride.batchId });
    if (!row) return false;
    await appendEvent(tx, shopId, {
      type: 'OVERRIDE_SEEN',
      by: memberId,
      happenedAt: now,
      recordedAt: now,
      data: { overrideId, batchId: row.batchId },
    });
    return true;
  });
  if (seen) services.hub.wake();
  return seen;
}
