/**
 * Keeps the demo shop's data as this version writes them, for the test that later versions migrate them:
 * `node test/migrations/dump.mjs`, once before each landing. The file is named after the newest migration.
 */
import { mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { gzipSync } from 'node:zlib';
import { buildWhenStale } from '../../server/launch/build.mjs';
import { mustRun } from '../../server/launch/children.mjs';
import { freePort } from '../../server/launch/free-port.mjs';
import { findPostgres } from '../../server/launch/postgres.mjs';
import { root } from '../../server/launch/root.mjs';
import { serve } from '../../server/launch/serve.mjs';
import { TEST_BUILD, TEST_SECRET } from '../test-settings.mjs';
import { startThrowAway } from '../throw-away.mjs';

const journal = JSON.parse(
  await readFile(path.join(root, 'drizzle/migrations/meta/_journal.json'), 'utf8'),
);
const newest = journal.entries.at(-1).tag;

await buildWhenStale(TEST_BUILD);
const { bin } = await findPostgres();
const cluster = await startThrowAway();
const data = await mkdtemp(path.join(tmpdir(), 'clamptide-data-'));
try {
  const ask = (url, sql) =>
    mustRun(path.join(bin, 'psql'), ['-X', '-q', '-A', '-t', '-d', url, '-c', sql]);
  const url = cluster.url.replace(/\/postgres$/, '/dump');
  await ask(cluster.url, 'create database dump');
  const port = await freePort();
  const server = serve([`dist/${TEST_BUILD}server/main.mjs`], {
    NODE_ENV: 'development',
    PORT: `${port}`,
    CLAMPTIDE_DATA: data,
    CLAMPTIDE_WEB: `dist/${TEST_BUILD}web`,
    CLAMPTIDE_SECRET: TEST_SECRET,
    ADMIN_DATABASE_URL: url,
  });
  await server.ready;
  await server.stop();
  const tables = await ask(
    url,
    "select relname from pg_class where relkind = 'r' and relnamespace = 'public'::regnamespace order by 1",
  );
  const counts = {};
  for (const table of tables.stdout.trim().split('\n')) {
    counts[table] = Number((await ask(url, `select count(*) from public."${table}"`)).stdout);
  }
  const folder = path.join(root, 'test/migrations/landed');
  const file = path.join(folder, `${newest}.sql`);
  await mkdir(folder, { recursive: true });
  await mustRun(path.join(bin, 'pg_dump'), ['-d', url, '-f', file]);
  await writeFile(`${file}.gz`, gzipSync(await readFile(file), { level: 9 }));
  await writeFile(path.join(folder, `${newest}.json`), `${JSON.stringify(counts, null, 2)}\n`);
  await rm(file);
  process.stdout.write(`kept test/migrations/landed/${newest}.sql.gz\n`);
} finally {
  await rm(data, { recursive: true, force: true });
  await cluster.end();
}
