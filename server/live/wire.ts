import pg from 'pg';
import type { Logger } from 'pino';

const EVENTS = 'clamptide_events';
const REVOKED = 'clamptide_revoked';
const WATCHERS = 'clamptide_watchers';

/** One notification for whatever was committed in this many milliseconds: each takes a lock on the whole database. */
const COALESCE_MS = 15;

export interface WireEvents {
  woken(): void;
  revoked(credential: string): void;
  watchers(from: string, counts: Record<string, number>): void;
}

/**
 * The line between server processes: PostgreSQL's notifications, heard on a connection of its own. It carries wake-ups
 * and ids, never content, and may lose them: whoever listens also polls.
 */
export class Wire {
  private client: pg.Client | null = null;
  private closed = false;
  private poking: NodeJS.Timeout | null = null;
  private readonly beat: NodeJS.Timeout;

  constructor(
    private readonly url: string,
    private readonly pool: pg.Pool,
    private readonly log: Logger,
    private readonly events: WireEvents,
  ) {
    void this.listen();
    // A line that has gone dead says nothing: ask it.
    this.beat = setInterval(() => {
      this.client?.query('select 1').catch(() => this.client?.end().catch(() => undefined));
    }, 10_000);
    this.beat.unref();
  }

  poke(): void {
    this.poking ??= setTimeout(() => {
      this.poking = null;
      this.send(EVENTS, '');
    }, COALESCE_MS);
  }

  revoke(credential: string): void {
    this.send(REVOKED, credential);
  }

  share(from: string, counts: Record<string, number>): void {
    // A notification holds 8,000 bytes: the busiest shops are told, the count of the others is a little low.
    const told = Object.fromEntries(
      Object.entries(counts)
        .sort(([, a], [, b]) => b - a)
        .slice(0, 100),
    );
    this.send(WATCHERS, JSON.stringify({ from, counts: told }));
  }

  async close(): Promise<void> {
    this.closed = true;
    clearInterval(this.beat);
    if (this.poking) clearTimeout(this.poking);
    await this.client?.end().catch(() => undefined);
  }

  private send(channel: string, payload: string): void {
    if (this.closed) return;
    this.pool
      .query('select pg_notify($1, $2)', [channel, payload])
      .catch((error: unknown) => this.log.warn({ error }, 'a notification was not sent'));
  }

  private async listen(attempt = 0): Promise<void> {
    if (this.closed) return;
    const client = new pg.Client({ connectionString: this.url });
    let ended = false;
    const again = () => {
      if (ended) return;
      ended = true;
      if (this.client === client) this.client = null;
      if (this.closed) return;
      const wait = Math.min(5_000, 200 * 2 ** Math.min(attempt, 6));
      setTimeout(() => void this.listen(attempt + 1), wait).unref();
    };
    client.on('error', again);
    client.on('end', again);
    client.on('notification', ({ channel, payload = '' }) => this.heard(channel, payload));
    try {
      await client.connect();
      if (this.closed) {
        await client.end();
        return;
      }
      await client.query(`listen ${EVENTS}; listen ${REVOKED}; listen ${WATCHERS}`);
      this.client = client;
      attempt = 0;
      // Whatever was said while nobody listened is in the tables.
      this.events.woken();
    } catch (error) {
      this.log.warn({ error }, 'cannot listen to the database yet');
      await client.end().catch(() => undefined);
      again();
    }
  }

  private heard(channel: string, payload: string): void {
    switch (channel) {
      case EVENTS:
        this.events.woken();
        break;
      case REVOKED:
        this.events.revoked(payload);
        break;
      case WATCHERS: {
        const { from, counts } = JSON.parse(payload) as {
          from: string;
          counts: Record<string, number>;
        };
        this.events.watchers(from, counts);
        break;
      }
    }
  }
}
