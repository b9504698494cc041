import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { drizzle } from 'drizzle-orm/node-postgres';
import { readMigrationFiles } from 'drizzle-orm/migrator';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import pg from 'pg';
import { SettingsError, type Secret } from '#server/settings/settings';
import { DOORS, passwordOf, roleOf } from './connections';
import type { Doors } from './doors';

/** Whoever owns tables and functions. Nobody signs in as it. */
const OWNER = 'clamptide_owner';
/** One process sets up at a time, whichever database of the cluster it is: roles belong to all of them. */
const SETUP_LOCK = 7_301_101;

/**
 * Makes the roles, migrates, and checks that what is applied is what the journal says. Safe to run at every start and by
 * several processes at once. The address must belong to a user who may create roles.
 */
export async function setUpDatabase(
  adminUrl: string,
  secrets: readonly [Secret, ...Secret[]],
): Promise<void> {
  const client = new pg.Client({ connectionString: adminUrl });
  client.on('error', () => undefined);
  await client.connect();
  try {
    await client.query('select pg_advisory_lock($1)', [SETUP_LOCK]);
    await makeRoles(client, secrets);
    await refuseNewer(client);
    await client.query(`set role ${OWNER}`);
    await client.query(`set lock_timeout = '10s'`);
    await migrate(drizzle(client), { migrationsFolder: migrationsFolder() });
    await checkApplied(client);
  } finally {
    await client.end();
  }
}

/** Whether all migrations of this build are applied. */
export async function migrationsAtHead(doors: Pick<Doors, 'entry'>): Promise<boolean> {
  const [row] = await doors.entry<{ count: string }>('select entry.migration_count() as count');
  return Number(row?.count) === journal().length;
}

/** The folder of the migrations, beside the source or beside the bundle. */
export function migrationsFolder(): string {
  const here = path.dirname(fileURLToPath(import.meta.url));
  const found = ['../../drizzle/migrations', '../drizzle/migrations']
    .map((folder) => path.resolve(here, folder))
    .find((folder) => existsSync(folder));
  if (!found) throw new Error('The migrations are missing from this installation.');
  return found;
}

async function makeRoles(
  client: pg.Client,
  secrets: readonly [Secret, ...Secret[]],
): Promise<void> {
  const exists = async (role: string) =>
    (await client.query('select 1 from pg_roles where rolname = $1', [role])).rowCount === 1;
  const database = client.escapeIdentifier(client.database ?? '');
  if (!(await exists(OWNER))) await client.query(`create role ${OWNER} nologin`);
  await client.query(`grant ${OWNER} to current_user`);
  for (const door of DOORS) {
    const role = roleOf(door);
    if (!(await exists(role))) await client.query(`create role ${role} login`);
    const password = client.escapeLiteral(passwordOf(door, secrets));
    await client.query(
      `alter role ${role} login nosuperuser nobypassrls nocreatedb nocreaterole password ${password}`,
    );
    await client.query(`grant connect on database ${database} to ${role}`);
    await client.query(`alter role ${role} set idle_in_transaction_session_timeout = '15s'`);
    if (door === 'work') continue;
    await client.query(`alter role ${role} set statement_timeout = '15s'`);
    await client.query(`alter role ${role} set lock_timeout = '5s'`);
  }
  await client.query(`revoke all on schema public from public`);
  await client.query(`grant create, usage on schema public to ${OWNER} with grant option`);
  await client.query(`grant create on database ${database} to ${OWNER}, ${roleOf('work')}`);
}

/** A database of a newer build is left alone: an older one would not understand its rows. */
async function refuseNewer(client: pg.Client): Promise<void> {
  const { rows: known } = await client.query<{ there: boolean }>(
    `select to_regclass('drizzle.__drizzle_migrations') is not null as there`,
  );
  if (!known[0]?.there) return;
  const { rows } = await client.query<{ when: string | null }>(
    'select max(created_at) as when from drizzle.__drizzle_migrations',
  );
  const newest = Math.max(...journal().map((entry) => entry.when));
  if (Number(rows[0]?.when ?? 0) > newest) {
    throw new SettingsError(
      'The database was made by a newer version of Clamptide. Start that version, or restore a backup made with this one; nothing was changed.',
    );
  }
}

/** The migrator skips a migration that is older than the newest applied one without a word: count and compare instead. */
async function checkApplied(client: pg.Client): Promise<void> {
  const { rows } = await client.query<{ hash: string }>(
    'select hash from drizzle.__drizzle_migrations order by created_at',
  );
  const wanted = readMigrationFiles({ migrationsFolder: migrationsFolder() }).map((m) => m.hash);
  const applied = rows.map((row) => row.hash);
  if (wanted.length !== applied.length || wanted.some((hash, i) => hash !== applied[i])) {
    throw new SettingsError(
      'The database was not migrated as this version expects: its list of migrations differs. Restore a backup or ask for help; nothing else was changed.',
    );
  }
}

function journal(): { when: number }[] {
  const file = path.join(migrationsFolder(), 'meta', '_journal.json');
  const parsed = JSON.parse(readFileSync(file, 'utf8')) as { entries: { when: number }[] };
  return parsed.entries;
}
