import { maxAliasesRule } from '@escape.tech/graphql-armor-max-aliases';
import { maxDepthRule } from '@escape.tech/graphql-armor-max-depth';
import { maxDirectivesRule } from '@escape.tech/graphql-armor-max-directives';
import { GraphQLError, specifiedRules, type ValidationContext, type ValidationRule } from 'graphql';

/*
 * The same bounds for HTTP and for sockets, so that neither is the way around the other.
 */

/** Tokens of a document; checked while parsing. */
export const MAX_TOKENS = 2000;
/** Bytes of an HTTP body or of one socket message. */
export const MAX_BYTES = 64 * 1024;
export const MAX_DEPTH = 10;
export const MAX_ALIASES = 20;
export const MAX_DIRECTIVES = 30;
/** Open subscriptions of one socket. */
export const MAX_SUBSCRIPTIONS = 20;
/** Open sockets of one person, client or screen. */
export const MAX_SOCKETS_EACH = 60;

/** What a limit does with a document beyond it: left to itself it throws, which would count as a fault of the server. */
function refuseWith(sentence: string) {
  return {
    propagateOnRejection: false,
    onReject: [
      (context: ValidationContext | null) => context?.reportError(new GraphQLError(sentence)),
    ],
  };
}

/** Rules beyond those of the GraphQL specification. */
export const LIMIT_RULES: readonly ValidationRule[] = [
  maxDepthRule({
    n: MAX_DEPTH,
    ...refuseWith(`The document goes deeper than ${MAX_DEPTH} levels: ask for less at once.`),
  }),
  maxAliasesRule({
    n: MAX_ALIASES,
    ...refuseWith(`The document has more than ${MAX_ALIASES} aliases: ask for less at once.`),
  }),
  maxDirectivesRule({
    n: MAX_DIRECTIVES,
    ...refuseWith(`The document has more than ${MAX_DIRECTIVES} directives.`),
  }),
];

/** All rules, for whoever validates without Apollo. */
export const SOCKET_RULES: readonly ValidationRule[] = [...specifiedRules, ...LIMIT_RULES];
