import { createClient } from 'graphql-ws';
import WebSocket from 'ws';
import { fromCursor } from '#server/live/cursor';
import type { ApiServer } from './api-server';
import type { Caller } from './caller';
import { BATCH_FIELDS, type BatchAnswer } from './commands';
import { until } from './until';

export interface FloorMessage {
  cursor: string;
  reset: boolean;
  shopChanged: boolean;
  by: string | null;
  watchers: number;
  batches: BatchAnswer[];
}

const CHANGES = `subscription ($after: Cursor) {
  floorChanges(after: $after) { cursor reset shopChanged by watchers batches { ${BATCH_FIELDS} } }
}`;

/** Someone who watches the Floor on a socket of their own, and keeps everything that came. */
export interface Follower {
  messages: FloorMessage[];
  /** The numbers of the last events in the messages. */
  seqs(): number[];
  /** The different versions of a batch, in the order in which they came. */
  versions(batchId: string): number[];
  /** Waits until the event with that number has come, or something after it. */
  reached(seq: number | null): Promise<void>;
  /** The code with which the socket closed. */
  closed: Promise<number>;
  /** Pulls the plug, as a lost network does. */
  cut(): void;
  end(): Promise<void>;
}

/**
 * Follows the Floor: from a place in the stream, from where it is read now, or (null) from whenever the server comes to
 * the subscription, as clients without a place do.
 */
export async function follow(
  server: ApiServer,
  caller: Caller,
  from: string | 'HERE' | null = 'HERE',
): Promise<Follower> {
  const after = from === 'HERE' ? await cursorOf(caller.at(server.url)) : from;
  const { cookieHeader, bearer } = caller;
  let socket: WebSocket | undefined;
  class CallersSocket extends WebSocket {
    constructor(address: string, protocols: string[]) {
      super(address, protocols, { headers: cookieHeader ? { Cookie: cookieHeader } : {} });
      // eslint-disable-next-line @typescript-eslint/no-this-alias -- the client makes the socket, the test cuts it
      socket = this;
    }
  }
  let close: (code: number) => void = () => undefined;
  const closed = new Promise<number>((resolve) => (close = resolve));
  const messages: FloorMessage[] = [];
  const client = createClient({
    url: `${server.url.replace('http', 'ws')}/graphql`,
    webSocketImpl: CallersSocket,
    retryAttempts: 0,
    lazy: true,
    ...(bearer && { connectionParams: { authorization: `Bearer ${bearer}` } }),
    on: { closed: (event) => close((event as { code: number }).code) },
  });
  let failure: string | null = null;
  client.subscribe<{ floorChanges: FloorMessage }>(
    { query: CHANGES, variables: { after } },
    {
      next: ({ data, errors }) => {
        if (data) messages.push(data.floorChanges);
        else failure = JSON.stringify(errors);
      },
      error: (error) => (failure = JSON.stringify(error)),
      complete: () => undefined,
    },
  );
  const seqs = () => messages.map(({ cursor }) => fromCursor(cursor) ?? -1);
  return {
    messages,
    seqs,
    versions: (batchId) => {
      const all = messages.flatMap(({ batches }) => batches).filter(({ id }) => id === batchId);
      return all.map(({ version }) => version).filter((v, i, list) => v !== list[i - 1]);
    },
    reached: async (seq) => {
      await until(
        `event ${seq} has come`,
        () => failure ?? seqs().at(-1) ?? 0,
        (last) => typeof last === 'number' && last >= (seq ?? 0),
      );
    },
    closed,
    cut: () => socket?.terminate(),
    end: async () => client.dispose(),
  };
}

async function cursorOf(caller: Caller): Promise<string> {
  const { floor } = await caller.get<{ floor: { cursor: string } }>('{ floor { cursor } }');
  return floor.cursor;
}
