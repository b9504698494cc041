import { existsSync, readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { gunzipSync } from 'node:zlib';
import pg from 'pg';
import { describe, expect, it } from 'vitest';
import { mustRun } from '../../server/launch/children.mjs';
import { findPostgres } from '../../server/launch/postgres.mjs';
import { freshDatabase, setUp } from '../database';
import { repository, startServer } from '../server';

const folder = path.join(repository, 'test/migrations/landed');
const kept = existsSync(folder)
  ? readdirSync(folder).filter((name) => name.endsWith('.sql.gz'))
  : [];

describe('data of earlier landings', () => {
  it('are kept', () => {
    expect(kept, 'run "node test/migrations/dump.mjs"').not.toEqual([]);
  });

  it.each(kept)('%s migrates, loses no row and is served', { timeout: 120_000 }, async (name) => {
    const other = await freshDatabase();
    const database = await freshDatabase();
    try {
      // A dump names roles, which belong to the cluster: setting up any database makes them.
      await setUp(other.adminUrl);
      await restore(database.adminUrl, gunzipSync(readFileSync(path.join(folder, name))));
      await setUp(database.adminUrl);
      const before = JSON.parse(
        readFileSync(path.join(folder, name.replace('.sql.gz', '.json')), 'utf8'),
      ) as Record<string, number>;
      const after = await countRows(database.adminUrl);
      const still = Object.entries(before).filter(([table]) => table in after);
      expect(still.length).toBeGreaterThan(0);
      expect(Object.fromEntries(still.map(([table]) => [table, after[table]]))).toEqual(
        Object.fromEntries(still),
      );
      const server = await startServer(database.adminUrl, { CLAMPTIDE_DEMO: 'off' });
      try {
        expect((await fetch(`${server.url}/readyz`)).status).toBe(200);
      } finally {
        await server.stop();
      }
    } finally {
      await database.drop();
      await other.drop();
    }
  });
});

async function restore(adminUrl: string, sql: Buffer): Promise<void> {
  const { bin } = await findPostgres();
  const args = ['-X', '-q', '-v', 'ON_ERROR_STOP=1', '-d', adminUrl, '-f', '-'];
  await mustRun(path.join(bin, 'psql'), args, { input: sql });
}

async function countRows(adminUrl: string): Promise<Record<string, number>> {
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  try {
    const { rows } = await client.query<{ relname: string }>(
      "select relname from pg_class where relkind = 'r' and relnamespace = 'public'::regnamespace",
    );
    const counts: Record<string, number> = {};
    for (const { relname } of rows) {
      const { rows: answer } = await client.query<{ n: number }>(
        `select count(*)::int as n from public.${client.escapeIdentifier(relname)}`,
      );
      counts[relname] = answer[0]?.n ?? 0;
    }
    return counts;
  } finally {
    await client.end();
  }
}
