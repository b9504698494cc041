import type { Resolvers } from '#server/generated/schema';
import { endOtherSessions, endSession } from './end-session';
import { readSessions } from './read-sessions';
import { signIn } from './sign-in';
import { signOut } from './sign-out';
import { signUp } from './sign-up';
import { switchShop } from './switch-shop';
import { membershipsOf, readViewer } from './viewer';

export const sessionResolvers: Resolvers = {
  Query: {
    viewer: async (_source, _args, context) => {
      const { principal, services } = context;
      if (principal?.kind !== 'member') return null;
      const memberships = await membershipsOf(services, principal.personId);
      return context.read((tx) => readViewer(tx, principal, memberships));
    },
    sessions: (_source, _args, context) => readSessions(context),
  },
  Mutation: {
    signUp: (_source, { input }, context) => signUp(context, input),
    signIn: (_source, { email, password }, context) => signIn(context, email, password),
    signOut: (_source, _args, context) => signOut(context),
    switchShop: (_source, { shopId }, context) => switchShop(context, shopId),
    endSession: (_source, { id }, context) => endSession(context, id),
    endOtherSessions: (_source, _args, context) => endOtherSessions(context),
  },
};
