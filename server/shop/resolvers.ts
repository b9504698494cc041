import type { Resolvers } from '#server/generated/schema';
import { readShop } from './read-shop';
import { setClamps } from './set-clamps';
import { setHours } from './set-hours';

export const shopResolvers: Resolvers = {
  Query: {
    shop: (_source, _args, context) => context.read((tx) => readShop(tx)),
  },
  Mutation: {
    setHours: (_source, args, context) => setHours(context, args),
    setClamps: (_source, { version, clamps }, context) => setClamps(context, version, clamps),
  },
};
