import type { Server } from 'node:http';
import { blockFieldSuggestionsPlugin } from '@escape.tech/graphql-armor-block-field-suggestions';
import { ApolloServer, type ApolloServerPlugin } from '@apollo/server';
import { ApolloServerPluginLandingPageDisabled } from '@apollo/server/plugin/disabled';
import { ApolloServerPluginDrainHttpServer } from '@apollo/server/plugin/drainHttpServer';
import { GraphQLError, type GraphQLSchema } from 'graphql';
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
    stopOnTerminationSignals: false,
    includeStacktraceInErrorResponses: false,
    validationRules: [...LIMIT_RULES],
    parseOptions: { maxTokens: MAX_TOKENS },
    formatError: (formatted, error) => {
      if (formatted.extensions?.['code'] !== 'INTERNAL_SERVER_ERROR') return formatted;
      log.error({ error }, 'a resolver failed');
      return {
        message: 'Something went wrong on the server. Nothing was half done; try again.',
        extensions: { code: 'INTERNAL_SERVER_ERROR' },
      };
    },
    plugins: [
      ApolloServerPluginLandingPageDisabled(),
      ApolloServerPluginDrainHttpServer({ httpServer: server }),
      blockFieldSuggestionsPlugin() as ApolloServerPlugin<Context>,
      endSnapshots,
      plainJsonStatus,
      introspectionForKnownCallers,
    ],
  });
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
      didResolveOperation: ({ operation, contextValue }) => {
        if (contextValue.principal || !operation) return Promise.resolve();
        const asks = operation.selectionSet.selections.some(
          (selection) =>
            selection.kind === 'Field' &&
            (selection.name.value === '__schema' || selection.name.value === '__type'),
        );
        if (!asks) return Promise.resolve();
        throw new GraphQLError('Sign in or send an API key to read the schema.', {
          extensions: { code: 'UNAUTHENTICATED' },
        });
      },
    }),
};
