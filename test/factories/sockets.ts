import { once } from 'node:events';
import { createClient } from 'graphql-ws';
import WebSocket from 'ws';
import type { ApiServer } from './api-server';
import type { Caller } from './caller';

/** How a subscription ended or what it first said. */
export type FirstWord =
  | { kind: 'NEXT'; data: Record<string, unknown> }
  | { kind: 'ERRORS'; codes: string[] }
  | { kind: 'CLOSED'; code: number };

export interface Subscription {
  first: Promise<FirstWord>;
  /** The code with which the socket closed. */
  closed: Promise<number>;
  end(): Promise<void>;
}

/** Subscribes over a socket of its own, as the caller. */
export function subscribe(
  server: ApiServer,
  caller: Caller,
  query: string,
  variables: Record<string, unknown> = {},
): Subscription {
  const { cookieHeader, bearer } = caller;
  class CallersSocket extends WebSocket {
    constructor(address: string, protocols: string[]) {
      super(address, protocols, { headers: cookieHeader ? { Cookie: cookieHeader } : {} });
    }
  }
  let settle: (word: FirstWord) => void = () => undefined;
  let close: (code: number) => void = () => undefined;
  const first = new Promise<FirstWord>((resolve) => (settle = resolve));
  const closed = new Promise<number>((resolve) => (close = resolve));
  const client = createClient({
    url: `${server.url.replace('http', 'ws')}/graphql`,
    webSocketImpl: CallersSocket,
    retryAttempts: 0,
    lazy: true,
    ...(bearer && { connectionParams: { authorization: `Bearer ${bearer}` } }),
    on: {
      closed: (event) => {
        const { code } = event as { code: number };
        close(code);
        settle({ kind: 'CLOSED', code });
      },
    },
  });
  client.subscribe<Record<string, unknown>>(
    { query, variables },
    {
      next: ({ data, errors }) => {
        if (errors) settle({ kind: 'ERRORS', codes: errors.map(codeOf) });
        else settle({ kind: 'NEXT', data: data ?? {} });
      },
      error: (error) => {
        if (Array.isArray(error)) settle({ kind: 'ERRORS', codes: error.map(codeOf) });
      },
      complete: () => undefined,
    },
  );
  return { first, closed, end: async () => client.dispose() };
}

function codeOf(error: { message: string; extensions?: Record<string, unknown> }): string {
  return String(error.extensions?.['code'] ?? error.message);
}

/** A socket that said who it is and was let in, and asks for nothing. */
export async function openSocket(
  server: Pick<ApiServer, 'url'>,
  { cookieHeader, bearer }: Caller,
): Promise<{ closed: Promise<number> }> {
  const socket = new WebSocket(
    `${server.url.replace('http', 'ws')}/graphql`,
    'graphql-transport-ws',
    { headers: cookieHeader ? { Cookie: cookieHeader } : {} },
  );
  socket.on('error', () => undefined);
  const closed = new Promise<number>((resolve) => socket.on('close', resolve));
  await once(socket, 'open');
  const payload = bearer ? { authorization: `Bearer ${bearer}` } : {};
  socket.send(JSON.stringify({ type: 'connection_init', payload }));
  await once(socket, 'message');
  return { closed };
}
