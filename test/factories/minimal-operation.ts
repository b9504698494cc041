import {
  getNamedType,
  isEnumType,
  isInputObjectType,
  isLeafType,
  isListType,
  isNonNullType,
  type GraphQLField,
  type GraphQLInputType,
} from 'graphql';

const SAMPLES: Record<string, unknown> = {
  ID: 'x',
  String: 'x',
  Int: 1,
  Boolean: true,
  Date: '2026-12-01',
  DateTime: '2026-12-01T08:00:00Z',
  Length: '100000000',
  Cursor: 'djE6MA',
};

/** The smallest operation that asks for a root field: well-formed, with arguments that name nothing. */
export function minimalOperation(
  kind: 'query' | 'mutation' | 'subscription',
  field: GraphQLField<unknown, unknown>,
): { query: string; variables: Record<string, unknown> } {
  const args = field.args.filter((arg) => isNonNullType(arg.type));
  const declared = args.map((arg) => `$${arg.name}: ${String(arg.type)}`).join(', ');
  const given = args.map((arg) => `${arg.name}: $${arg.name}`).join(', ');
  const selection = isLeafType(getNamedType(field.type)) ? '' : ' { __typename }';
  return {
    query: `${kind}${declared && `(${declared})`} { ${field.name}${given && `(${given})`}${selection} }`,
    variables: Object.fromEntries(args.map((arg) => [arg.name, sample(arg.type)])),
  };
}

function sample(type: GraphQLInputType): unknown {
  if (isNonNullType(type)) return sample(type.ofType as GraphQLInputType);
  if (isListType(type)) return [];
  if (isEnumType(type)) return type.getValues()[0]?.name;
  if (isInputObjectType(type)) {
    const fields = Object.values(type.getFields()).filter((field) => isNonNullType(field.type));
    return Object.fromEntries(fields.map((field) => [field.name, sample(field.type)]));
  }
  return SAMPLES[type.name];
}
