import type { Instant } from '#shared/time/instant';
import { may } from '#shared/members/permissions';
import { judgeFinish } from './judge-finish';
import { judgeMove } from './judge-move';
import { judgeStart } from './judge-start';
import type { Actor, FloorBatch, FloorCommand, FloorShop } from './model';
import { noChanges, refuse, type Verdict } from './refusal';

/** Everything the rules look at: the shop, its batches (the one commanded among them), and the moment. */
export interface FloorView {
  shop: FloorShop;
  batches: readonly FloorBatch[];
  now: Instant;
}

/**
 * What the rules of the floor say to a command: the changes it makes, or the one reason why not. The server asks before
 * every write, the client before every drop.
 */
export function judge(
  view: FloorView,
  batch: FloorBatch,
  command: FloorCommand,
  actor: Actor,
): Verdict {
  if (!may(actor.roles, 'moveBatches')) return refuse({ code: 'FORBIDDEN', what: 'MOVE' });
  if (command.kind !== 'ASSIGN' && command.override && !may(actor.roles, 'overrideHolds')) {
    return refuse({ code: 'FORBIDDEN', what: 'OVERRIDE' });
  }
  switch (command.kind) {
    case 'START':
      return judgeStart(view, batch, command, actor);
    case 'FINISH':
      return judgeFinish(view, batch, command, actor);
    case 'MOVE':
      return judgeMove(view, batch, command, actor);
    case 'ASSIGN':
      return {
        ok: true,
        changes: {
          ...noChanges(),
          fields: { assignedTo: { before: batch.assignedTo, after: command.memberId } },
        },
      };
  }
}
