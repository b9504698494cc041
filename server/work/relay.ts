import type pg from 'pg';
import type { Services } from '#server/http/services';

const RELAY_LOCK = 7_301_103;
const POLL_MS = 1_000;

/** Kinds of events after which no date can have moved. */
const PLAN_NEUTRAL = [
  'PLAN_MADE',
  'OVERRIDE_SEEN',
  'SCREEN_PAIRED',
  'SCREEN_REVOKED',
  'API_KEY_MADE',
  'API_KEY_REVOKED',
];

/**
 * Turns events into jobs, in bulk: one planning job for each shop in which something happened that can move a date. One
 * process at a time does it, by an advisory lock; what it has read is its own cursor, so another goes on where it stopped.
 */
export class Relay {
  private leader: pg.PoolClient | null = null;
  private running: Promise<void> | null = null;
  private again = false;
  private stopped = false;
  private readonly timer: NodeJS.Timeout;
  private readonly unhook: () => void;

  constructor(private readonly services: Services) {
    this.timer = setInterval(() => this.turn(), POLL_MS);
    this.timer.unref();
    this.unhook = services.hub.onWoken(() => this.turn());
  }

  async stop(): Promise<void> {
    this.stopped = true;
    clearInterval(this.timer);
    this.unhook();
    await this.running?.catch(() => undefined);
    if (this.leader) this.resign(this.leader);
  }

  private turn(): void {
    if (this.stopped) return;
    if (this.running) {
      this.again = true;
      return;
    }
    this.running = this.relay()
      .catch((error: unknown) => {
        this.services.log.warn({ error }, 'relaying events failed; trying again');
        if (this.leader) this.resign(this.leader);
      })
      .finally(() => {
        this.running = null;
        if (!this.again) return;
        this.again = false;
        this.turn();
      });
  }

  private async relay(): Promise<void> {
    const client = await this.lead();
    if (!client) return;
    const { rows } = await client.query<{ shop_id: string; seq: number; plans: boolean }>(
      `select s.shop_id, s.seq, exists (
         select from event e where e.shop_id = s.shop_id and e.seq > coalesce(c.seq, 0) and e.seq <= s.seq
           and e.type <> all ($1)) as plans
       from shop_counter s left join relay_cursor c using (shop_id)
       where s.seq > coalesce(c.seq, 0)`,
      [PLAN_NEUTRAL],
    );
    if (rows.length === 0) return;
    const shops = rows.filter((row) => row.plans).map((row) => row.shop_id);
    if (shops.length > 0) await addPlanJobs(this.services.doors.work, shops);
    await client.query(
      `insert into relay_cursor (shop_id, seq) select * from unnest($1::uuid[], $2::int[])
       on conflict (shop_id) do update set seq = greatest(relay_cursor.seq, excluded.seq)`,
      [rows.map((row) => row.shop_id), rows.map((row) => row.seq)],
    );
  }

  /** This process's connection as the one that relays; null while another process is. */
  private async lead(): Promise<pg.PoolClient | null> {
    if (this.leader) return this.leader;
    const client = await this.services.doors.relay.connect();
    let mine: boolean;
    try {
      const { rows } = await client.query<{ mine: boolean }>(
        'select pg_try_advisory_lock($1) as mine',
        [RELAY_LOCK],
      );
      mine = rows[0]?.mine === true;
    } catch (error) {
      client.release(true);
      throw error;
    }
    if (!mine) {
      client.release();
      return null;
    }
    client.once('error', () => this.resign(client));
    this.leader = client;
    return client;
  }

  /** Gives the lock up with its connection. A broken one goes back too: the pool would count it as in use for ever. */
  private resign(client: pg.PoolClient): void {
    if (this.leader !== client) return;
    this.leader = null;
    client.release(true);
  }
}

/** One job a shop: a second one while the first waits replaces it. Shops plan beside each other, one plan a shop. */
async function addPlanJobs(work: pg.Pool, shops: readonly string[]): Promise<void> {
  await work.query(
    `select graphile_worker.add_job('plan', json_build_object('shopId', shop), queue_name := 'plan ' || shop,
       job_key := 'plan ' || shop, job_key_mode := 'replace', max_attempts := 5)
     from unnest($1::text[]) as shop`,
    [shops],
  );
}
