import type { Resolvers } from '#server/generated/schema';
import { createDesign } from './create-design';
import { readDesigns } from './read-designs';

export const designResolvers: Resolvers = {
  Query: {
    designs: (_source, _args, context) => context.read((tx) => readDesigns(tx)),
  },
  Mutation: {
    createDesign: (_source, { input }, context) => createDesign(context, input),
  },
};
