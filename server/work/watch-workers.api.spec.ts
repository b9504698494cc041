import pg from 'pg';
import { pino } from 'pino';
import { runMigrations } from 'graphile-worker';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { openDoors, type Doors } from '#server/db/doors';
import { parseSecrets } from '#server/settings/settings';
import { migratedDatabase, type TestDatabase } from '#test/database';
import { until } from '#test/factories/until';
import { TEST_SECRET } from '../../test/test-settings.mjs';
import { WorkerWatch } from './watch-workers';

let database: TestDatabase;
let doors: Doors;
let admin: pg.Pool;
const watches: WorkerWatch[] = [];

beforeAll(async () => {
  database = await migratedDatabase();
  doors = openDoors(database.adminUrl, parseSecrets(TEST_SECRET), () => undefined);
  admin = new pg.Pool({ connectionString: database.adminUrl, max: 1 });
  await runMigrations({ pgPool: doors.work });
});
afterAll(async () => {
  for (const watch of watches) watch.stop();
  await admin.end();
  await doors.close();
  await database.drop();
});

function newWatch(): WorkerWatch {
  const watch = new WorkerWatch({ doors, log: pino({ level: 'silent' }) }, 200);
  watches.push(watch);
  return watch;
}

/** A job that a worker has had for a minute. */
async function jobOf(workerId: string): Promise<void> {
  await admin.query(
    `select graphile_worker.add_job('plan', '{}', queue_name := 'plan ' || $1, job_key := 'plan ' || $1)`,
    [workerId],
  );
  await admin.query(
    `with queue as (
       update graphile_worker._private_job_queues set locked_by = $1, locked_at = now() - interval '1 minute'
       where queue_name = 'plan ' || $1
     ) update graphile_worker._private_jobs set locked_by = $1, locked_at = now() - interval '1 minute'
       where key = 'plan ' || $1`,
    [workerId],
  );
}

const locked = async () => {
  const { rows } = await admin.query<{ locked_by: string }>(
    `select locked_by from graphile_worker.jobs where locked_by is not null
     intersect select locked_by from graphile_worker._private_job_queues order by 1`,
  );
  return rows.map((row) => row.locked_by);
};

it('releases the jobs of workers without a lock, and of no others', async () => {
  const mine = newWatch();
  const other = newWatch();
  mine.holdLockOf('pool-mine');
  other.holdLockOf('pool-other');
  await jobOf('pool-mine');
  await jobOf('pool-other');
  // Each of these is seen by a sweep that has seen the living ones too, over and over.
  for (const dead of ['pool-dead', 'pool-gone']) {
    await jobOf(dead);
    await until('it is released', locked, (workers) => !workers.includes(dead));
    expect(await locked()).toEqual(['pool-mine', 'pool-other']);
  }
  // Connections end and come back: the locks are taken anew before anything else is looked at.
  await admin.query(
    `select pg_terminate_backend(pid) from pg_stat_activity
     where usename = 'clamptide_work' and datname = current_database()`,
  );
  await jobOf('pool-late');
  await until('it is released', locked, (workers) => !workers.includes('pool-late'));
  mine.letGoOf('pool-mine');
  await until('it is released', locked, (workers) => !workers.includes('pool-mine'));
  other.stop();
  await until('it is released', locked, (workers) => workers.length === 0);
});
