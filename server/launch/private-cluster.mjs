import { createHash, randomBytes } from 'node:crypto';
import { existsSync } from 'node:fs';
import { readFile, stat, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import {
  askCluster,
  clusterUrl,
  dataOf,
  dataVersion,
  initCluster,
  startCluster,
  stopCluster,
} from './cluster.mjs';
import { readOrMake } from './data-folder.mjs';
import { canWorkIn, isRoot, ownerIds } from './database-user.mjs';
import { needFree } from './disk.mjs';
import { findPostgres, findPostgresOf } from './postgres.mjs';
import { say, saySlow } from './say.mjs';
import { Stop } from './stop.mjs';

const DATABASE = 'clamptide';

/**
 * Starts the PostgreSQL cluster that belongs to this data folder alone, making it the first time.
 * Answers `{ url, stop }`, the superuser's address of the product's database.
 */
export async function startPrivateCluster(data) {
  const known = await knownFolder(data);
  const version = known === null ? null : await checkKnown(known, data);
  const postgres = await findMatching(version, known);
  const folder = version === null ? await chooseFolder(data, known) : known;
  const passwordFile = path.join(data, 'postgres-password');
  if (version === null) {
    await needFree(folder, 300, 'making the database');
    const password = await readOrMake(passwordFile, () => randomBytes(24).toString('base64url'));
    await saySlow(`Making a PostgreSQL ${postgres.major} cluster of its own in ${folder}`, () =>
      initCluster(folder, postgres, password),
    );
  } else {
    await needFree(folder, 100, 'the database');
  }
  await writeFile(path.join(data, 'postgres-made'), '');
  const password = await readPassword(passwordFile, folder);
  const stop = () => stopCluster(folder, postgres);
  try {
    const { port, adopted } = await startCluster(folder, postgres);
    if (adopted) say('Taking over the database server that a killed start left running.');
    await makeDatabase(postgres, port, password);
    return { url: clusterUrl(port, password, DATABASE), stop };
  } catch (error) {
    await stop();
    throw error;
  }
}

const pointerOf = (data) => path.join(data, 'postgres-folder');

/** Where the cluster is when there is one already: in the data folder, or where a file in it points. */
async function knownFolder(data) {
  const pointed = await readFile(pointerOf(data), 'utf8').catch(() => null);
  if (pointed !== null) return pointed.trim();
  const inside = path.join(data, 'postgres');
  return (await exists(dataOf(inside))) ? inside : null;
}

/** As existsSync, but a folder that may not be looked into does exist. */
const exists = (file) =>
  stat(file).then(
    () => true,
    (error) => error.code !== 'ENOENT',
  );

/** The PostgreSQL version of the known cluster; null when it was chosen but never finished. */
async function checkKnown(folder, data) {
  const held = await stat(dataOf(folder)).catch((error) => {
    if (error.code === 'ENOENT') return null;
    throw new Stop(
      `The database in ${folder} belongs to another user (${error.code}): start as the user who made it, or set CLAMPTIDE_DATA to another folder.`,
    );
  });
  if (held === null) {
    if (!existsSync(path.join(data, 'postgres-made'))) return null;
    throw new Stop(
      `The database that belongs to ${data} stood in ${folder} and is gone: put it back, or remove ${data} to begin with an empty one.`,
    );
  }
  const { uid } = isRoot ? await ownerIdsOr(held.uid) : { uid: process.getuid() };
  if (held.uid !== uid) {
    throw new Stop(
      `The database in ${folder} belongs to another user (number ${held.uid}): start as the user who made it, or set CLAMPTIDE_DATA to another folder.`,
    );
  }
  const version = await dataVersion(folder);
  if (version === null) {
    throw new Stop(
      `${dataOf(folder)} is not a whole PostgreSQL database (it has no PG_VERSION): put a backup there, or move it away to begin with an empty one.`,
    );
  }
  return version;
}

/** Before PostgreSQL is installed its user may be missing, and then nobody can be compared. */
async function ownerIdsOr(uid) {
  return ownerIds().catch(() => ({ uid }));
}

async function findMatching(version, folder) {
  const newest = await findPostgres();
  if (version === null || version === newest.major) return newest;
  const matching = await findPostgresOf(version);
  if (matching) return matching;
  throw new Stop(
    `The database in ${folder} was written by PostgreSQL ${version} and this machine has ${newest.major}: type "apt-get install postgresql-${version}" and start again, or set CLAMPTIDE_DATA to another folder; nothing was changed.`,
  );
}

async function chooseFolder(data, known) {
  const inside = path.join(data, 'postgres');
  if (known && (await canWorkIn(known))) return known;
  if (await canWorkIn(inside)) return inside;
  const name = `clamptide-${createHash('sha256').update(data).digest('hex').slice(0, 12)}`;
  for (const place of ['/var/lib', '/var/tmp', tmpdir()]) {
    const folder = path.join(place, name);
    if (!(await canWorkIn(folder))) continue;
    await writeFile(pointerOf(data), `${folder}\n`);
    say(`PostgreSQL's user cannot enter ${data}, so the database is kept in ${folder}.`);
    return folder;
  }
  throw new Stop(
    `PostgreSQL's user cannot enter ${data}: set CLAMPTIDE_DATA to a folder that it can enter, such as /var/lib/clamptide.`,
  );
}

async function readPassword(file, folder) {
  try {
    return (await readFile(file, 'utf8')).trim();
  } catch (error) {
    if (error.code !== 'ENOENT') throw error;
    throw new Stop(
      `The password of the database in ${folder} is missing: put ${file} back from a backup, or move both away to begin with an empty one.`,
    );
  }
}

async function makeDatabase(postgres, port, password) {
  const sql = `select 1 from pg_database where datname = '${DATABASE}'`;
  if ((await askCluster(postgres, port, password, sql)) === '1') return;
  await askCluster(postgres, port, password, `create database ${DATABASE}`);
}
