import { Logger, runMigrations } from 'graphile-worker';
import pg from 'pg';
import { pino } from 'pino';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { openDoors, type Doors } from '#server/db/doors';
import type { Services } from '#server/http/services';
import { parseSecrets } from '#server/settings/settings';
import { migratedDatabase, type TestDatabase } from '#test/database';
import { until } from '#test/factories/until';
import { TEST_SECRET } from '../../test/test-settings.mjs';
import { JobRunner } from './job-runner';
import { WorkerWatch } from './watch-workers';

let database: TestDatabase;
let doors: Doors;
let admin: pg.Pool;

beforeAll(async () => {
  database = await migratedDatabase();
  doors = openDoors(database.adminUrl, parseSecrets(TEST_SECRET), () => undefined);
  admin = new pg.Pool({ connectionString: database.adminUrl, max: 1 });
});
afterAll(async () => {
  await admin.end();
  await doors.close();
  await database.drop();
});

it('begins anew when the queue does not hear how a job ended, and the job is done again', async () => {
  const logger = new Logger(() => () => undefined);
  const services = { doors, log: pino({ level: 'silent' }) } as unknown as Services;
  await runMigrations({ pgPool: doors.work, logger });
  // The first end of a job is not taken down, as when the connection is lost just then.
  await admin.query(`
    create sequence ends;
    grant usage on sequence ends to clamptide_work;
    create function refuse_once() returns trigger language plpgsql as $$
    begin
      if nextval('ends') = 1 then raise exception 'The line is dead.'; end if;
      return old;
    end $$;
    grant usage on schema public to clamptide_work;
    create trigger refuse_once before delete on graphile_worker._private_jobs
      for each row execute function refuse_once()`);
  let runs = 0;
  const watch = new WorkerWatch(services, 200);
  const runner = new JobRunner(services, logger, { plan: () => void runs++ }, watch);
  await runner.begin();
  await admin.query(`select graphile_worker.add_job('plan', '{}', queue_name := 'plan x')`);
  await until(
    'the job is done',
    async () => (await admin.query('select from graphile_worker.jobs')).rowCount,
    (left) => left === 0,
  );
  expect(runs).toBe(2);
  await runner.stop();
  watch.stop();
});
