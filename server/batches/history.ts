import { and, desc, eq, inArray, lt } from 'drizzle-orm';
import { batch, reworkReason, routeCopy } from '#drizzle/tables/batch';
import { event } from '#drizzle/tables/event';
import { member } from '#drizzle/tables/member';
import type { FloorChangeSet } from '#shared/floor/model';
import type { Place } from '#shared/route/route';
import { batchEventSentence } from '#shared/words/event-words';
import type { BatchEventPage } from '#server/generated/schema';
import type { Context } from '#server/http/context';
import { globalId, localId } from '#server/http/global-id';
import { fromCursor, toCursor } from '#server/live/cursor';

/** What the data of a batch's events may hold. */
interface EventData {
  changes?: FloorChangeSet;
  to?: Place;
  reasonId?: string;
  boards?: number;
}

function assigneeOf({ changes }: EventData): string | null {
  return changes?.fields.assignedTo?.after ?? null;
}

/** What happened to a batch, the newest first. */
export function batchHistory(
  context: Context,
  batchGlobalId: string,
  first: number,
  after: string | null,
): Promise<BatchEventPage> {
  const empty = { nodes: [], pageInfo: { hasNextPage: false, endCursor: null } };
  const batchId = localId('batch', batchGlobalId);
  if (batchId === null) return Promise.resolve(empty);
  const size = Math.min(100, Math.max(1, first));
  const before = after === null ? null : fromCursor(after);
  return context.read(async (tx) => {
    const [route] = await tx
      .select({ id: routeCopy.id, steps: routeCopy.steps })
      .from(batch)
      .innerJoin(routeCopy, eq(routeCopy.id, batch.routeId))
      .where(eq(batch.id, batchId));
    if (!route) return empty;
    const rows = await tx
      .select({ event, name: member.name })
      .from(event)
      .leftJoin(member, eq(member.id, event.by))
      .where(and(eq(event.batchId, batchId), before === null ? undefined : lt(event.seq, before)))
      .orderBy(desc(event.seq))
      .limit(size + 1);
    const page = rows.slice(0, size);
    const reasonIds = page.flatMap((row) => (row.event.data as EventData).reasonId ?? []);
    const reasons = new Map(
      reasonIds.length === 0
        ? []
        : (await tx.select().from(reworkReason).where(inArray(reworkReason.id, reasonIds))).map(
            (row) => [row.id, row.reason],
          ),
    );
    const given = page.flatMap((row) => assigneeOf(row.event.data as EventData) ?? []);
    const assignees = new Map(
      given.length === 0
        ? []
        : (
            await tx
              .select({ id: member.id, name: member.name })
              .from(member)
              .where(inArray(member.id, given))
          ).map((row) => [row.id, row.name]),
    );
    const nodes = page.map(({ event: row, name }) => {
      const data = row.data as EventData;
      return {
        seq: row.seq,
        type: row.type,
        happenedAt: row.happenedAt.toISOString(),
        recordedAt: row.recordedAt.toISOString(),
        by: row.by && globalId('member', row.by),
        sentence: batchEventSentence({
          type: row.type,
          personName: name,
          changes: data.changes ?? null,
          steps: route.steps,
          to: data.to ?? null,
          boards: data.boards ?? null,
          reason: data.reasonId ? (reasons.get(data.reasonId) ?? null) : null,
          assigneeName: assignees.get(assigneeOf(data) ?? '') ?? null,
        }),
      };
    });
    const last = nodes.at(-1);
    return {
      nodes,
      pageInfo: { hasNextPage: rows.length > size, endCursor: last ? toCursor(last.seq) : null },
    };
  });
}
