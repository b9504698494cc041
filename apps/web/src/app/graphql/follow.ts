/** What every message of a resumable subscription carries: its place in the stream. */
export interface Placed {
  readonly cursor: string;
}

/** As much of the socket's client as following needs. */
export interface Subscriber {
  subscribe<T>(
    payload: { query: string; operationName?: string; variables?: Record<string, unknown> },
    sink: {
      next(result: { data?: T | null; errors?: readonly unknown[] }): void;
      error(reason: unknown): void;
      complete(): void;
    },
  ): () => void;
}

export interface Following {
  /** The place after which a reconnect goes on; null before the first message of a subscription from now on. */
  cursor(): string | null;
  stop(): void;
}

/**
 * Follows a stream from a place on, without gaps and without repeats.
 *
 * The socket's client keeps the payload and sends the very same object again when it reconnects. So the variables in it
 * are changed in place with every message: a reconnect then asks for what came after the last message that was seen.
 */
export function follow<T extends Placed>(
  socket: Subscriber,
  source: { query: string; operationName: string; field: string },
  after: string | null,
  on: { item(item: T): void; failed(reason: unknown): void; ended(): void },
): Following {
  const variables: { after: string | null } = { after };
  let stopped = false;
  const unsubscribe = socket.subscribe<Record<string, T>>(
    { query: source.query, operationName: source.operationName, variables },
    {
      next(result) {
        if (stopped) return;
        if (result.errors && result.errors.length > 0) {
          on.failed(result.errors);
          return;
        }
        const item = result.data?.[source.field];
        if (!item || item.cursor === variables.after) return;
        variables.after = item.cursor;
        on.item(item);
      },
      error(reason) {
        if (!stopped) on.failed(reason);
      },
      complete() {
        if (!stopped) on.ended();
      },
    },
  );
  return {
    cursor: () => variables.after,
    stop() {
      stopped = true;
      unsubscribe();
    },
  };
}
