import { existsSync, readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { makeExecutableSchema } from '@graphql-tools/schema';
import type { GraphQLSchema } from 'graphql';
import { apiResolvers } from '#server/api/resolvers';
import { batchResolvers } from '#server/batches/resolvers';
import { designResolvers } from '#server/designs/resolvers';
import { floorResolvers } from '#server/floor/resolvers';
import type { Resolvers } from '#server/generated/schema';
import { liveResolvers } from '#server/live/resolvers';
import { memberResolvers } from '#server/members/resolvers';
import { orderResolvers } from '#server/orders/resolvers';
import { planResolvers } from '#server/plan/resolvers';
import { screenResolvers } from '#server/screens/resolvers';
import { sessionResolvers } from '#server/session/resolvers';
import { shopResolvers } from '#server/shop/resolvers';
import { guardSchema } from './access';
import { baseResolvers } from './base-resolvers';

const RESOLVERS: readonly Resolvers[] = [
  baseResolvers,
  sessionResolvers,
  memberResolvers,
  shopResolvers,
  designResolvers,
  batchResolvers,
  floorResolvers,
  orderResolvers,
  screenResolvers,
  apiResolvers,
  planResolvers,
  liveResolvers,
];

/** The executable schema: the contract of schema/, its resolvers, and the access table in front of them. */
export function makeSchema(): GraphQLSchema {
  const typeDefs = contractFiles().map((file) => readFileSync(file, 'utf8'));
  const schema = makeExecutableSchema({
    typeDefs,
    resolvers: [...RESOLVERS],
    resolverValidationOptions: { requireResolversToMatchSchema: 'error' },
  });
  return guardSchema(schema);
}

/** The contract's files, beside the source or beside the bundle. */
function contractFiles(): string[] {
  const here = path.dirname(fileURLToPath(import.meta.url));
  const folder = ['../../schema', '../schema', '../../../schema']
    .map((candidate) => path.resolve(here, candidate))
    .find((candidate) => existsSync(path.join(candidate, 'base.graphql')));
  if (!folder) throw new Error('The schema is missing from this installation.');
  return readdirSync(folder)
    .filter((name) => name.endsWith('.graphql'))
    .sort()
    .map((name) => path.join(folder, name));
}
