import type { Resolvers } from '#server/generated/schema';
import { pairScreen } from './pair-screen';
import { pollPairing } from './poll-pairing';
import { readScreens } from './read-screens';
import { revokeScreen } from './revoke-screen';
import { startPairing } from './start-pairing';

export const screenResolvers: Resolvers = {
  Query: {
    screens: (_source, _args, context) => readScreens(context),
  },
  Mutation: {
    startPairing: (_source, _args, context) => startPairing(context),
    pollPairing: (_source, { secret }, context) => pollPairing(context, secret),
    pairScreen: (_source, { code, name }, context) => pairScreen(context, code, name),
    revokeScreen: (_source, { id }, context) => revokeScreen(context, id),
  },
};
