import { and, desc, eq } from 'drizzle-orm';
import { event } from '#drizzle/tables/event';
import type { FloorChangeSet } from '#shared/floor/model';
import { refuse } from '#shared/floor/refusal';
import { judgeUndo } from '#shared/floor/undo';
import { FLOOR_EVENT_TYPES } from '#server/db/events';
import type { BatchPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { runFloorCommand } from './command';

/** Takes the last command on a batch back, within ten minutes. */
export function undoCommand(
  context: Context,
  batchId: string,
  eventSeq: number,
): Promise<BatchPayload> {
  const { memberId, roles } = memberOf(context);
  return runFloorCommand(context, {
    batchId,
    version: null,
    happenedAt: null,
    looksBack: true,
    type: () => 'COMMAND_UNDONE',
    reasons: { override: null, rework: null },
    judge: async (view, { floor }, tx) => {
      const [last] = await tx
        .select()
        .from(event)
        .where(eq(event.batchId, floor.id))
        .orderBy(desc(event.seq))
        .limit(1);
      const [wanted] = await tx
        .select()
        .from(event)
        .where(and(eq(event.batchId, floor.id), eq(event.seq, eventSeq)));
      const undoable =
        wanted &&
        wanted.type !== 'COMMAND_UNDONE' &&
        FLOOR_EVENT_TYPES.some((type) => type === wanted.type);
      if (!undoable) return refuse({ code: 'UNDO_BUILT_ON' });
      const { changes } = wanted.data as { changes: FloorChangeSet };
      const recorded = {
        by: wanted.by,
        recordedAt: wanted.recordedAt.getTime(),
        changes,
        isLatest: last?.seq === wanted.seq,
      };
      return judgeUndo(view, floor, recorded, { memberId, roles });
    },
    data: { undoes: eventSeq },
  });
}
