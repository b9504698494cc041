import { judge } from '#shared/floor/judge';
import type { FloorCommand } from '#shared/floor/model';
import type { BatchPayload, StepCommandInput } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { runFloorCommand } from './command';

/** Starts or finishes a step on one or more pieces of a batch. */
export function stepCommand(
  context: Context,
  kind: 'START' | 'FINISH',
  input: StepCommandInput,
): Promise<BatchPayload> {
  const { memberId, roles } = memberOf(context);
  const happenedAt = input.happenedAt == null ? null : Date.parse(input.happenedAt);
  const command: FloorCommand = {
    kind,
    step: input.step,
    pieces: input.pieces,
    happenedAt,
    override: input.override ?? null,
  };
  return runFloorCommand(context, {
    batchId: input.batchId,
    version: input.version,
    happenedAt,
    type: () => (kind === 'START' ? 'STEP_STARTED' : 'STEP_FINISHED'),
    reasons: { override: input.override?.reason ?? null, rework: null },
    judge: (view, { floor }) => judge(view, floor, command, { memberId, roles }),
  });
}
