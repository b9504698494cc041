import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { parseSecrets } from '#server/settings/settings';
import { TEST_SECRET } from './test-settings.mjs';

/** A database for one test file, on the throw-away cluster. */
export interface TestDatabase {
  /** The superuser's address: for setting up, and for looking behind the walls. */
  adminUrl: string;
  /** Ends whoever is still connected and removes the database. */
  drop(): Promise<void>;
}

const TEMPLATE = 'clamptide_template';
/** One at a time makes the template, the others wait for it. */
const TEMPLATE_LOCK = 7_301_102;
const SETUP_LOCK = 7_301_103;

function clusterUrl(): string {
  const url = process.env['TEST_ADMIN_DATABASE_URL'];
  if (!url) {
    throw new Error(
      'No test database: put this file where the projects "api", "migrations" or "browser" of test/vitest.config.ts find it.',
    );
  }
  return url;
}

function urlOf(database: string): string {
  const url = new URL(clusterUrl());
  url.pathname = `/${database}`;
  return url.href;
}

/** Runs work on the cluster's own database. */
async function onCluster<T>(work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: clusterUrl() });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

async function create(template: string | null): Promise<TestDatabase> {
  const name = `test_${randomBytes(8).toString('hex')}`;
  await onCluster(async (client) => {
    await client.query(`create database ${name}${template ? ` template ${template}` : ''}`);
    if (template) await copyRights(client, template, name);
  });
  return {
    adminUrl: urlOf(name),
    drop: () =>
      onCluster(async (client) => {
        await client.query(`drop database if exists ${name} with (force)`);
      }),
  };
}

/** A clone has its template's contents, but not the rights that were given on the database itself. */
async function copyRights(client: pg.Client, from: string, to: string): Promise<void> {
  const { rows } = await client.query<{ grant: string }>(
    `select format('grant %s on database %I to %I', privilege_type, $2::text, grantee::regrole) as grant
       from pg_database, aclexplode(datacl)
      where datname = $1 and grantee not in (0, datdba)`,
    [from, to],
  );
  for (const row of rows) await client.query(row.grant);
}

/** An empty database. */
export function freshDatabase(): Promise<TestDatabase> {
  return create(null);
}

/** Makes the roles and migrates, as a server does at its start. */
export async function setUp(adminUrl: string): Promise<void> {
  const { setUpDatabase } = await import('#server/db/setup');
  await onCluster(async (client) => {
    // Roles belong to the whole cluster, and an advisory lock to one database: tests that run side by side share this one.
    await client.query('select pg_advisory_lock($1)', [SETUP_LOCK]);
    await setUpDatabase(adminUrl, parseSecrets(TEST_SECRET));
  });
}

/** A database with roles and all migrations, cloned from one that is set up once a run. */
export async function migratedDatabase(): Promise<TestDatabase> {
  await onCluster(async (client) => {
    await client.query('select pg_advisory_lock($1)', [TEMPLATE_LOCK]);
    const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [
      TEMPLATE,
    ]);
    if (rowCount) return;
    const making = `${TEMPLATE}_making`;
    await client.query(`drop database if exists ${making} with (force)`);
    await client.query(`create database ${making}`);
    await setUp(urlOf(making));
    await client.query(`alter database ${making} rename to ${TEMPLATE}`);
  });
  return create(TEMPLATE);
}
