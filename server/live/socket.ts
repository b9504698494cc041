import type { IncomingMessage, Server } from 'node:http';
import type { Duplex } from 'node:stream';
import { GraphQLError, parse, validate, type DocumentNode, type GraphQLSchema } from 'graphql';
import { useServer } from 'graphql-ws/use/ws';
import { WebSocketServer, type WebSocket } from 'ws';
import { principalOf, type Credentials } from '#server/http/authenticate';
import { makeContext } from '#server/http/context';
import { readSessionCookie } from '#server/http/cookie';
import {
  MAX_BYTES,
  MAX_SOCKETS_EACH,
  MAX_SUBSCRIPTIONS,
  MAX_TOKENS,
  SOCKET_RULES,
} from '#server/http/limits';
import { isOwnOrigin } from '#server/http/origin';
import type { Principal } from '#server/http/principal';
import type { Services } from '#server/http/services';
import { subscribeOnce } from './subscribe-once';

/** The close code for a credential that has ended: clients come back with another, or stop. */
const FORBIDDEN = 4403;
const RECHECK_MS = 60_000;

interface Extra extends Record<PropertyKey, unknown> {
  socket: WebSocket;
  request: IncomingMessage;
  principal?: Principal;
  credentials?: Credentials;
}

/**
 * The socket path: subscriptions only, under the same limits and access rules as HTTP. Sockets close when their
 * credential ends, at once where a revocation is heard and within a minute otherwise.
 */
export function serveSockets(
  server: Server,
  schema: GraphQLSchema,
  services: Services,
): { close(): Promise<void> } {
  const sockets = new WebSocketServer({ noServer: true, maxPayload: MAX_BYTES });
  const open = new Map<WebSocket, Extra>();
  const documents = new Map<string, DocumentNode | readonly GraphQLError[]>();

  server.on('upgrade', (request: IncomingMessage, stream: Duplex, head: Buffer) => {
    const path = new URL(request.url ?? '/', 'http://localhost').pathname;
    const refuse = (status: string) =>
      stream.end(`HTTP/1.1 ${status}\r\nConnection: close\r\n\r\n`);
    stream.on('error', () => stream.destroy());
    if (path !== '/graphql') return refuse('404 Not Found');
    if (!isOwnOrigin(request, services.settings)) return refuse('403 Forbidden');
    sockets.handleUpgrade(request, stream, head, (socket) => {
      socket.on('error', () => socket.terminate());
      socket.on('close', () => open.delete(socket));
      sockets.emit('connection', socket, request);
    });
  });

  const graphql = useServer<Record<string, unknown>, Extra>(
    {
      schema,
      connectionInitWaitTimeout: 10_000,
      onConnect: async ({ extra, connectionParams }) => {
        const given = connectionParams?.['authorization'];
        extra.credentials = {
          session: readSessionCookie(extra.request.headers.cookie, services.settings),
          authorization: typeof given === 'string' ? given : null,
        };
        const principal = await principalOf(services, extra.credentials);
        // Who hung up meanwhile is not counted: nobody would say goodbye for it.
        if (!principal || extra.socket.readyState !== extra.socket.OPEN) return false;
        const mine = [...open.values()].filter(
          (other) => other.principal?.credential === principal.credential,
        );
        if (mine.length >= MAX_SOCKETS_EACH) {
          extra.socket.close(4429, 'Too many connections');
          return false;
        }
        extra.principal = principal;
        open.set(extra.socket, extra);
        return true;
      },
      onSubscribe: ({ extra, subscriptions }, _id, payload) => {
        if (Object.keys(subscriptions).length > MAX_SUBSCRIPTIONS) {
          return [limitError('This connection has too many subscriptions.')];
        }
        const document = documentOf(payload.query);
        if (Array.isArray(document)) return document as readonly GraphQLError[];
        const context = makeContext(services, extra.principal ?? null, {
          device: '',
          address: '',
          setSession: () => undefined,
        });
        return {
          schema,
          document: document as DocumentNode,
          operationName: payload.operationName,
          variableValues: payload.variables,
          contextValue: context,
        };
      },
      subscribe: subscribeOnce,
      onError: (_context, _id, _payload, errors) => errors.map(hideInternals),
      onNext: (_context, _id, _payload, _args, result) =>
        result.errors ? { ...result, errors: result.errors.map(hideInternals) } : result,
    },
    sockets,
  );

  function documentOf(query: string): DocumentNode | readonly GraphQLError[] {
    const known = documents.get(query);
    if (known) return known;
    const made = readDocument(schema, query);
    if (documents.size > 500) documents.clear();
    documents.set(query, made);
    return made;
  }

  const stopHearing = services.hub.onRevoked((credential) => {
    for (const [socket, { principal }] of open) {
      if (principal?.credential === credential) socket.close(FORBIDDEN, 'Forbidden');
    }
  });
  const rechecks = setInterval(() => {
    for (const [socket, extra] of open) {
      if (!extra.credentials) continue;
      principalOf(services, extra.credentials)
        .then((principal) => {
          const same =
            principal?.shopId === extra.principal?.shopId && sameRights(principal, extra.principal);
          if (!same) socket.close(FORBIDDEN, 'Forbidden');
        })
        .catch((error: unknown) => services.log.warn({ error }, 'a socket was not checked'));
    }
  }, RECHECK_MS);
  rechecks.unref();

  return {
    close: async () => {
      clearInterval(rechecks);
      stopHearing();
      for (const socket of sockets.clients) socket.close(1001, 'Going away');
      await graphql.dispose();
    },
  };
}

function sameRights(a: Principal | null | undefined, b: Principal | null | undefined): boolean {
  const rights = (p: Principal | null | undefined) =>
    p?.kind === 'member' ? [...p.roles].sort().join() : (p?.kind ?? '');
  return rights(a) === rights(b);
}

/** A document that may run on a socket, or what is wrong with it. */
function readDocument(
  schema: GraphQLSchema,
  query: string,
): DocumentNode | readonly GraphQLError[] {
  try {
    const document = parse(query, { maxTokens: MAX_TOKENS });
    const errors = validate(schema, document, SOCKET_RULES, { hideSuggestions: true });
    if (errors.length > 0) return errors;
    const others = document.definitions.some(
      (definition) =>
        definition.kind === 'OperationDefinition' && definition.operation !== 'subscription',
    );
    if (!others) return document;
    return [
      new GraphQLError(
        'A socket carries subscriptions only. Send queries and mutations over HTTP.',
        {
          extensions: { code: 'SUBSCRIPTIONS_ONLY' },
        },
      ),
    ];
  } catch (error) {
    return [
      error instanceof GraphQLError ? error : new GraphQLError('The document cannot be read.'),
    ];
  }
}

function limitError(message: string): GraphQLError {
  return new GraphQLError(message, { extensions: { code: 'LIMIT_EXCEEDED' } });
}

function hideInternals(error: GraphQLError): GraphQLError {
  if (!error.originalError || error.originalError instanceof GraphQLError) return error;
  return new GraphQLError('Something went wrong on the server.', {
    extensions: { code: 'INTERNAL_SERVER_ERROR' },
  });
}
