import { judge } from '#shared/floor/judge';
import type { FloorCommand } from '#shared/floor/model';
import { placeOf } from '#shared/floor/progress';
import { rankOf } from '#shared/route/route';
import type { BatchPayload, MoveBatchInput } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { runFloorCommand } from './command';

/** Moves a batch: forward finishes the steps in between, back is rework. */
export function moveBatch(context: Context, input: MoveBatchInput): Promise<BatchPayload> {
  const { memberId, roles } = memberOf(context);
  const happenedAt = input.happenedAt == null ? null : Date.parse(input.happenedAt);
  const command: FloorCommand = {
    kind: 'MOVE',
    to: input.to,
    reason: input.reason ?? null,
    happenedAt,
    override: input.override ?? null,
  };
  let isRework = false;
  return runFloorCommand(context, {
    batchId: input.batchId,
    version: input.version,
    happenedAt,
    type: () => (isRework ? 'BATCH_REWORKED' : 'BATCH_MOVED'),
    get reasons() {
      const override = input.override?.reason ?? null;
      return { override, rework: isRework ? (input.reason ?? override) : null };
    },
    judge: (view, { floor }) => {
      isRework = rankOf(input.to) < rankOf(placeOf(floor, happenedAt ?? view.now));
      return judge(view, floor, command, { memberId, roles });
    },
    data: { to: input.to },
  });
}
