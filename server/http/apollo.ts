import type { Server } from 'node:http';
import { ApolloServer, type ApolloServerPlugin } from '@apollo/server';
import { ApolloServerPluginLandingPageDisabled } from '@apollo/server/plugin/disabled';
import { ApolloServerPluginDrainHttpServer } from '@apollo/server/plugin/drainHttpServer';
import { BREAK, GraphQLError, visit, type DocumentNode, type GraphQLSchema } from 'graphql';
import type { Logger } from 'pino';
import type { Context } from './context';
import { LIMIT_RULES, MAX_TOKENS } from './limits';

/** Codes that say the request was not well made; clients that ask for plain JSON get these with status 200. */
const REQUEST_ERRORS = new Set([
  'GRAPHQL_PARSE_FAILED',
  'GRAPHQL_VALIDATION_FAILED',
  'BAD_USER_INPUT',
  'OPERATION_RESOLUTION_FAILURE',
]);

/** Apollo over a guarded schema. */
export function makeApollo(
  schema: GraphQLSchema,
  server: Server,
  log: Logger,
): ApolloServer<Context> {
  return new ApolloServer<Context>({
    schema,
    introspection: true,
    csrfPrevention: true,
    hideSchemaDetailsFromClientErrors: true,
    stopOnTerminationSignals: false,
    includeStacktraceInErrorResponses: false,
    validationRules: [...LIMIT_RULES],
    parseOptions: { maxTokens: MAX_TOKENS },
    formatError: (formatted, error) => {
      if (formatted.extensions?.['code'] !== 'INTERNAL_SERVER_ERROR') return formatted;
      if (isUnstorable(error)) {
        return {
          message: 'A text has a character in it that cannot be stored.',
          extensions: { code: 'BAD_USER_INPUT' },
        };
      }
      log.error({ error }, 'a resolver failed');
      return {
        message: 'Something went wrong on the server. Nothing was half done; try again.',
        extensions: { code: 'INTERNAL_SERVER_ERROR' },
      };
    },
    plugins: [
      ApolloServerPluginLandingPageDisabled(),
      ApolloServerPluginDrainHttpServer({ httpServer: server }),
      endSnapshots,
      plainJsonStatus,
      introspectionForKnownCallers,
    ],
  });
}

/** PostgreSQL's codes for a text with the character NUL, as text and inside JSON. */
const UNSTORABLE = ['22021', '22P05'];

/** Whether the database refused a text that no type of the API excludes. The error stands behind those that wrap it. */
function isUnstorable(error: unknown): boolean {
  for (let depth = 0; depth < 6 && error instanceof Error; depth++) {
    if (UNSTORABLE.includes(String((error as { code?: unknown }).code))) return true;
    error = error instanceof GraphQLError ? error.originalError : error.cause;
  }
  return false;
}

/** The snapshot of an operation ends with its response. */
const endSnapshots: ApolloServerPlugin<Context> = {
  requestDidStart: () =>
    Promise.resolve({
      willSendResponse: ({ contextValue }) => contextValue.forget(),
    }),
};

/** GraphQL over HTTP: plain JSON answers carry request errors with status 200; the newer media type keeps 400. */
const plainJsonStatus: ApolloServerPlugin<Context> = {
  requestDidStart: () =>
    Promise.resolve({
      willSendResponse: ({ request, response }) => {
        const accept = request.http?.headers.get('accept') ?? '';
        if (accept.includes('application/graphql-response+json')) return Promise.resolve();
        const { body } = response;
        if (body.kind !== 'single' || !body.singleResult.errors?.length) return Promise.resolve();
        const all = body.singleResult.errors.every((error) =>
          REQUEST_ERRORS.has(String(error.extensions?.['code'])),
        );
        if (all && body.singleResult.data === undefined && request.query !== undefined) {
          response.http.status = 200;
        }
        return Promise.resolve();
      },
    }),
};

/** The schema is published to whoever has a key or a session, and to nobody else. */
const introspectionForKnownCallers: ApolloServerPlugin<Context> = {
  requestDidStart: () =>
    Promise.resolve({
      didResolveOperation: ({ document, contextValue }) => {
        if (contextValue.principal || !asksForSchema(document)) return Promise.resolve();
        throw new GraphQLError('Sign in or send an API key to read the schema.', {
          extensions: { code: 'UNAUTHENTICATED' },
        });
      },
    }),
};

/** Whether a document asks about the schema, also by way of a fragment. */
function asksForSchema(document: DocumentNode): boolean {
  let asks = false;
  visit(document, {
    Field: ({ name }) => {
      asks ||= name.value === '__schema' || name.value === '__type';
      return asks ? BREAK : undefined;
    },
  });
  return asks;
}
