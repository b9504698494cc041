import type { Resolvers } from '#server/generated/schema';
import { assignBatch } from './assign-batch';
import { moveBatch } from './move-batch';
import { seeOverride, unseenOverrides } from './overrides';
import { readFloor } from './read-floor';
import { stepCommand } from './step-command';
import { undoCommand } from './undo-command';

export const floorResolvers: Resolvers = {
  Query: {
    floor: (_source, _args, context) => readFloor(context),
    unseenOverrides: (_source, _args, context) => unseenOverrides(context),
  },
  Mutation: {
    startStep: (_source, { input }, context) => stepCommand(context, 'START', input),
    finishStep: (_source, { input }, context) => stepCommand(context, 'FINISH', input),
    moveBatch: (_source, { input }, context) => moveBatch(context, input),
    undoCommand: (_source, { batchId, event }, context) => undoCommand(context, batchId, event),
    assignBatch: (_source, { batchId, version, memberId }, context) =>
      assignBatch(context, batchId, version, memberId ?? null),
    seeOverride: (_source, { id }, context) => seeOverride(context, id),
  },
};
