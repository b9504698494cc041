import type { Runner } from 'graphile-worker';
import type { Services } from '#server/http/services';

const SWEEP_MS = 4_000;
/** The first half of the advisory locks that stand for living workers. */
const WORKER_LOCK = 7_301_104;

/**
 * Each process holds an advisory lock for its worker, which the database lets go when the process dies. The others look
 * for workers that have jobs and no lock, and release those jobs, so that a plan is tried again within ten seconds.
 */
export async function watchWorkers(
  { doors, log }: Services,
  runner: Runner,
): Promise<{ stop(): Promise<void> }> {
  const client = await doors.work.connect();
  client.on('error', (error) => log.warn({ error }, 'the lock of a worker was lost'));
  const mine = new Set<string>();
  const hold = async (workerId: string) => {
    mine.add(workerId);
    await client.query('select pg_advisory_lock($1, hashtext($2))', [WORKER_LOCK, workerId]);
  };
  const holdLogged = (workerId: string) => {
    if (mine.has(workerId)) return;
    hold(workerId).catch((error: unknown) => log.warn({ error }, 'a worker has no lock'));
  };
  runner.events.on('worker:getJob:start', ({ worker }) => holdLogged(worker.workerId));

  const sweep = async () => {
    const { rows } = await doors.work.query<{ locked_by: string }>(
      'select distinct locked_by from graphile_worker.jobs where locked_by is not null',
    );
    for (const { locked_by: workerId } of rows) {
      if (mine.has(workerId)) continue;
      const { rows: got } = await client.query<{ dead: boolean }>(
        'select pg_try_advisory_lock($1, hashtext($2)) as dead',
        [WORKER_LOCK, workerId],
      );
      if (!got[0]?.dead) continue;
      await client.query('select graphile_worker.force_unlock_workers($1)', [[workerId]]);
      await client.query('select pg_advisory_unlock($1, hashtext($2))', [WORKER_LOCK, workerId]);
    }
  };
  const timer = setInterval(() => {
    sweep().catch((error: unknown) => log.warn({ error }, 'looking for dead workers failed'));
  }, SWEEP_MS);
  timer.unref();
  return {
    stop: async () => {
      clearInterval(timer);
      client.release(true);
      await Promise.resolve();
    },
  };
}
