import { GraphQLScalarType, GraphQLError, Kind } from 'graphql';
import { isLocalDate } from '#shared/time/zone';
import type { Resolvers } from '#server/generated/schema';

/** A scalar whose values are strings that pass a check. */
function stringScalar(
  name: string,
  wanted: string,
  parse: (text: string) => string | null,
): GraphQLScalarType<string, string> {
  const read = (value: unknown): string => {
    const parsed = typeof value === 'string' && value.length <= 100 ? parse(value) : null;
    if (parsed === null) {
      throw new GraphQLError(`${name} must be ${wanted}.`, {
        extensions: { code: 'BAD_USER_INPUT' },
      });
    }
    return parsed;
  };
  return new GraphQLScalarType<string, string>({
    name,
    serialize: (value) => String(value),
    parseValue: read,
    parseLiteral: (node) => read(node.kind === Kind.STRING ? node.value : null),
  });
}

const INSTANT = /^\d{4}-\d\d-\d\dT\d\d:\d\d(:\d\d(\.\d{1,9})?)?(Z|[+-]\d\d:\d\d)$/;

export const baseResolvers: Resolvers = {
  DateTime: stringScalar('DateTime', 'an instant such as 2026-12-01T14:06:00Z', (text) => {
    const at = INSTANT.test(text) ? Date.parse(text) : Number.NaN;
    return Number.isNaN(at) ? null : new Date(at).toISOString();
  }),
  Date: stringScalar('Date', 'a date such as 2026-12-01', (text) =>
    isLocalDate(text) ? text : null,
  ),
  Length: stringScalar('Length', 'whole nanometres, as a string of up to 15 digits', (text) =>
    /^\d{1,15}$/.test(text) ? BigInt(text).toString() : null,
  ),
  Cursor: stringScalar('Cursor', 'a cursor as it was handed out', (text) =>
    /^[\w-]+$/.test(text) ? text : null,
  ),
  Query: {
    now: (_source, _args, { services }) => services.now().toISOString(),
  },
  Mutation: {
    ping: () => true,
  },
};
