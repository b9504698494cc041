import { randomBytes } from 'node:crypto';
import { readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { clusterUrl, initCluster, startCluster, stopCluster } from '../server/launch/cluster.mjs';
import { canWorkIn } from '../server/launch/database-user.mjs';
import { findPostgres } from '../server/launch/postgres.mjs';

const PREFIX = 'clamptide-test-';

/** Places for the cluster in order of liking; the temporary folder of this user may be one that PostgreSQL's cannot enter. */
const places = () => [...new Set([tmpdir(), '/var/tmp', '/tmp'])];

/**
 * A PostgreSQL cluster of its own for tests: random port, nothing kept on disk safely, gone with `end`.
 * Answers `{ url, end }`, `url` being the superuser's for the database "postgres".
 */
export async function startThrowAway() {
  const postgres = await findPostgres();
  await sweep(postgres);
  const folder = await findPlace();
  await writeFile(path.join(folder, 'owner'), `${process.pid}\n`);
  const password = randomBytes(18).toString('base64url');
  const end = async () => {
    await stopCluster(folder, postgres, 'immediate');
    await rm(folder, { recursive: true, force: true, maxRetries: 5 });
  };
  try {
    await initCluster(folder, postgres, password, { throwAway: true });
    const { port } = await startCluster(folder, postgres, { throwAway: true });
    return { url: clusterUrl(port, password, 'postgres'), end };
  } catch (error) {
    await end();
    throw error;
  }
}

async function findPlace() {
  for (const place of places()) {
    const folder = path.join(place, `${PREFIX}${randomBytes(6).toString('hex')}`);
    if (await canWorkIn(folder)) return folder;
  }
  throw new Error(
    `PostgreSQL's user can write in none of ${places().join(', ')}: set TMPDIR to a folder where it can`,
  );
}

/** Removes clusters whose test run was killed before it could. */
async function sweep(postgres) {
  for (const place of places()) {
    const names = await readdir(place).catch(() => []);
    for (const name of names.filter((one) => one.startsWith(PREFIX))) {
      const folder = path.join(place, name);
      const owner = await readFile(path.join(folder, 'owner'), 'utf8').catch(() => '');
      // No owner yet means that another run is making it just now.
      if (!owner || isAlive(Number(owner))) continue;
      await stopCluster(folder, postgres, 'immediate');
      await rm(folder, { recursive: true, force: true });
    }
  }
}

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}
