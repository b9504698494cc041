import { maxAliasesRule } from '@escape.tech/graphql-armor-max-aliases';
import { maxDepthRule } from '@escape.tech/graphql-armor-max-depth';
import { maxDirectivesRule } from '@escape.tech/graphql-armor-max-directives';
import { specifiedRules, type ValidationRule } from 'graphql';

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

/** Rules beyond those of the GraphQL specification. */
export const LIMIT_RULES: readonly ValidationRule[] = [
  maxDepthRule({ n: MAX_DEPTH }),
  maxAliasesRule({ n: MAX_ALIASES }),
  maxDirectivesRule({ n: MAX_DIRECTIVES }),
];

/** All rules, for whoever validates without Apollo. */
export const SOCKET_RULES: readonly ValidationRule[] = [...specifiedRules, ...LIMIT_RULES];
