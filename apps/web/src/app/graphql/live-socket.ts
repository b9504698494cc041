import { createClient, type Client } from 'graphql-ws';

/** How long after a ping without an answer the connection counts as dead, in milliseconds. */
const PONG_WITHIN = 5_000;
/** The longest wait between two attempts, in milliseconds. */
const LONGEST_WAIT = 10_000;

export interface SocketEvents {
  /** Sent parameters when the socket opens, asked again at each attempt. */
  params(): Record<string, unknown>;
  connected(again: boolean): void;
  /** The other side gave a sign of life. */
  heard(): void;
  /** The connection is gone; the code is the socket's close code, 1006 when there was none. */
  closed(code: number): void;
}

/** Milliseconds before attempt `retries` (from 0): doubled each time, capped, spread by `chance` in [0, 1). */
export function waitBefore(retries: number, chance: number): number {
  const full = Math.min(LONGEST_WAIT, 500 * 2 ** Math.min(retries, 10));
  return Math.round(full / 2 + (full / 2) * chance);
}

function untilDueOrOnline(milliseconds: number): Promise<void> {
  return new Promise((resolve) => {
    const go = (): void => {
      clearTimeout(timer);
      window.removeEventListener('online', go);
      resolve();
    };
    const timer = setTimeout(go, milliseconds);
    window.addEventListener('online', go);
  });
}

/** A socket that never gives up by itself and notices a line that has gone dead without closing. */
export function openSocket(events: SocketEvents): Client {
  let socket: WebSocket | null = null;
  let pongDue: ReturnType<typeof setTimeout> | undefined;
  const scheme = location.protocol === 'https:' ? 'wss' : 'ws';
  return createClient({
    url: `${scheme}://${location.host}/graphql`,
    lazy: true,
    keepAlive: 10_000,
    connectionAckWaitTimeout: 10_000,
    retryAttempts: Infinity,
    shouldRetry: () => true,
    retryWait: (retries) => untilDueOrOnline(waitBefore(retries, Math.random())),
    connectionParams: () => events.params(),
    on: {
      connected: (opened, _payload, again) => {
        socket = opened as WebSocket;
        events.connected(again);
      },
      ping: (received) => {
        if (received) return;
        pongDue = setTimeout(() => {
          if (socket?.readyState === WebSocket.OPEN) socket.close(4408, 'No answer');
        }, PONG_WITHIN);
      },
      pong: (received) => {
        if (!received) return;
        clearTimeout(pongDue);
        events.heard();
      },
      closed: (event) => {
        clearTimeout(pongDue);
        socket = null;
        events.closed((event as Partial<CloseEvent>).code ?? 1006);
      },
    },
  });
}
