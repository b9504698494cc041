import type pg from 'pg';
import type { Services } from '#server/http/services';

const SWEEP_MS = 4_000;
/** The first half of the advisory locks that stand for living workers. */
const WORKER_LOCK = 7_301_104;
/** A worker that took its first job this short ago may still be on its way to its lock. */
const GRACE_SECONDS = 2;

/**
 * Each process holds an advisory lock for its worker (the queue's pool, in whose name jobs are locked), which the database
 * lets go when the process dies. The others look for workers that have jobs and no lock, and release those jobs, so that a
 * plan is tried again within ten seconds.
 */
export class WorkerWatch {
  private client: pg.PoolClient | null = null;
  private connecting: Promise<pg.PoolClient> | null = null;
  private stopped = false;
  /** This process's workers. */
  private readonly mine = new Set<string>();
  private readonly timer: NodeJS.Timeout;

  constructor(
    private readonly services: Pick<Services, 'doors' | 'log'>,
    sweepMs = SWEEP_MS,
  ) {
    this.timer = setInterval(() => this.logged(this.sweep()), sweepMs);
    this.timer.unref();
  }

  holdLockOf(workerId: string): void {
    if (this.mine.has(workerId)) return;
    this.mine.add(workerId);
    const held = this.client;
    // A connection that is being made takes the locks of all workers that are known by then.
    this.logged(held ? lock(held, workerId) : this.connection());
  }

  /** This process's worker is gone: whatever it left behind is free. */
  letGoOf(workerId: string): void {
    this.mine.delete(workerId);
    // A connection that is lost meanwhile lets go by itself.
    if (this.client) this.logged(unlock(this.client, workerId));
  }

  stop(): void {
    this.stopped = true;
    clearInterval(this.timer);
    if (this.client) this.drop(this.client);
  }

  private async sweep(): Promise<void> {
    const client = await this.connection();
    const { rows } = await client.query<{ locked_by: string }>(
      `select distinct locked_by from graphile_worker.jobs
       where locked_by is not null and locked_at < now() - make_interval(secs => $1)`,
      [GRACE_SECONDS],
    );
    for (const { locked_by: workerId } of rows) {
      if (this.mine.has(workerId)) continue;
      const { rows: got } = await client.query<{ dead: boolean }>(
        'select pg_try_advisory_lock($1, hashtext($2)) as dead',
        [WORKER_LOCK, workerId],
      );
      if (!got[0]?.dead) continue;
      await client.query('select graphile_worker.force_unlock_workers($1)', [[workerId]]);
      await unlock(client, workerId);
    }
  }

  /** The connection that holds the locks. When it breaks they are gone, and the next one takes them anew. */
  private connection(): Promise<pg.PoolClient> {
    if (this.client) return Promise.resolve(this.client);
    this.connecting ??= this.connect().finally(() => {
      this.connecting = null;
    });
    return this.connecting;
  }

  private async connect(): Promise<pg.PoolClient> {
    const client = await this.services.doors.work.connect();
    this.client = client;
    client.once('error', () => this.drop(client));
    try {
      for (const workerId of this.mine) await lock(client, workerId);
      if (this.stopped) throw new Error('The watch over workers has ended.');
    } catch (error) {
      this.drop(client);
      throw error;
    }
    return client;
  }

  private drop(client: pg.PoolClient): void {
    if (this.client !== client) return;
    this.client = null;
    client.release(true);
    // At once, not at the next sweep: meanwhile others take this process's workers for dead.
    if (!this.stopped) this.logged(this.connection());
  }

  private logged(work: Promise<unknown>): void {
    work.catch((error: unknown) => {
      if (this.stopped) return;
      this.services.log.warn({ error }, 'watching over workers failed; trying again');
    });
  }
}

async function lock(client: pg.PoolClient, workerId: string): Promise<void> {
  await client.query('select pg_advisory_lock($1, hashtext($2))', [WORKER_LOCK, workerId]);
}

async function unlock(client: pg.PoolClient, workerId: string): Promise<void> {
  await client.query('select pg_advisory_unlock($1, hashtext($2))', [WORKER_LOCK, workerId]);
}
