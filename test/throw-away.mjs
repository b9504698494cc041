import { randomBytes } from 'node:crypto';
import path from 'node:path';
import { clusterUrl, initCluster, startCluster } from '../server/launch/cluster.mjs';
import { findPostgres } from '../server/launch/postgres.mjs';
import { makeScratch } from './scratch.mjs';

/**
 * A PostgreSQL cluster of its own for tests: random port, nothing kept safely on disk, gone with `end`.
 * Answers `{ url, folder, end }`: the superuser's address of the database "postgres", and the scratch folder around it.
 */
export async function startThrowAway() {
  const postgres = await findPostgres();
  const scratch = await makeScratch(postgres);
  try {
    const cluster = path.join(scratch.folder, 'cluster');
    const password = randomBytes(18).toString('base64url');
    await initCluster(cluster, postgres, password, { throwAway: true });
    const { port } = await startCluster(cluster, postgres, { throwAway: true });
    return { url: clusterUrl(port, password, 'postgres'), ...scratch };
  } catch (error) {
    await scratch.end();
    throw error;
  }
}
