import { randomBytes } from 'node:crypto';
import { existsSync } from 'node:fs';
import { readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { dataOf, runningServer, stopCluster } from '../server/launch/cluster.mjs';
import { canWorkIn } from '../server/launch/database-user.mjs';

const PREFIX = 'clamptide-test-';

/** Places in order of liking; the temporary folder of this user may be one that PostgreSQL's cannot enter. */
const places = () => [...new Set([tmpdir(), '/var/tmp', '/tmp'])];

/**
 * A folder for everything that a test run leaves about, PostgreSQL's user included. `end` stops whatever cluster runs below
 * it and removes it. What a killed run left is removed by the next.
 */
export async function makeScratch(postgres) {
  await sweep(postgres);
  for (const place of places()) {
    const folder = path.join(place, `${PREFIX}${randomBytes(6).toString('hex')}`);
    if (!(await canWorkIn(folder))) continue;
    await writeFile(path.join(folder, 'owner'), `${process.pid}\n`);
    return { folder, end: () => remove(folder, postgres) };
  }
  throw new Error(
    `PostgreSQL's user can write in none of ${places().join(', ')}: set TMPDIR to a folder where it can`,
  );
}

async function sweep(postgres) {
  for (const place of places()) {
    const names = await readdir(place).catch(() => []);
    for (const name of names.filter((one) => one.startsWith(PREFIX))) {
      const folder = path.join(place, name);
      const owner = await readFile(path.join(folder, 'owner'), 'utf8').catch(() => '');
      // No owner yet means that another run is making it just now.
      if (owner && !isAlive(Number(owner))) await remove(folder, postgres);
    }
  }
}

async function remove(folder, postgres) {
  for (const cluster of await clustersBelow(folder, 3)) {
    if (await runningServer(cluster)) await stopCluster(cluster, postgres, 'immediate');
  }
  await rm(folder, { recursive: true, force: true, maxRetries: 5 });
}

async function clustersBelow(folder, depth) {
  if (existsSync(path.join(dataOf(folder), 'PG_VERSION'))) return [folder];
  if (depth === 0) return [];
  const entries = await readdir(folder, { withFileTypes: true }).catch(() => []);
  const below = entries
    .filter((entry) => entry.isDirectory())
    .map((entry) => clustersBelow(path.join(folder, entry.name), depth - 1));
  return (await Promise.all(below)).flat();
}

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}
