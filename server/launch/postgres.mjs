import { existsSync } from 'node:fs';
import { mkdir, readdir, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { mustRun, run } from './children.mjs';
import { isRoot } from './database-user.mjs';
import { say, saySlow } from './say.mjs';
import { Stop } from './stop.mjs';

const OLDEST = 15;
const DEBIAN = '/usr/lib/postgresql';

/** `{ bin, major }` of every PostgreSQL on this machine that is new enough, the newest first. */
async function installed() {
  const bins = new Set();
  for (const version of existsSync(DEBIAN) ? await readdir(DEBIAN) : []) {
    bins.add(path.join(DEBIAN, version, 'bin'));
  }
  for (const folder of (process.env.PATH ?? '').split(':')) {
    if (folder && !folder.startsWith(DEBIAN)) bins.add(folder);
  }
  const found = [];
  for (const bin of bins) {
    if (
      !['postgres', 'initdb', 'pg_ctl', 'psql'].every((name) => existsSync(path.join(bin, name)))
    ) {
      continue;
    }
    const { stdout } = await run(path.join(bin, 'postgres'), ['--version']);
    const major = Number(/(\d+)/.exec(stdout)?.[1]);
    if (major >= OLDEST) found.push({ bin, major });
  }
  return found.sort((a, b) => b.major - a.major);
}

/** The programs of the newest PostgreSQL here; Debian's package is installed when there is none and this process may. */
export async function findPostgres() {
  const [before] = await installed();
  if (before) return before;
  await installPackages(['postgresql'], 'PostgreSQL is not installed');
  const [after] = await installed();
  if (after) return after;
  throw new Stop(
    `Debian's package "postgresql" did not bring version ${OLDEST} or newer: install that by hand, or set DATABASE_URL to a server you have.`,
  );
}

/** The programs of one major version, or null when it is not on this machine. */
export async function findPostgresOf(major) {
  return (await installed()).find((one) => one.major === major) ?? null;
}

/** Whether a PostgreSQL is here, without installing one. */
export async function hasPostgres() {
  return (await installed()).length > 0;
}

/** Installs Debian packages, or stops with the one command that does. */
export async function installPackages(names, why) {
  const command = `apt-get update && apt-get install -y ${names.join(' ')}`;
  if (!isRoot || !existsSync('/usr/bin/apt-get')) {
    throw new Stop(`${why}: type "sudo sh -c '${command}'" and start again.`);
  }
  if (names.includes('postgresql')) await keepFromMakingACluster();
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  await saySlow(`${why}: installing Debian's package ${names.join(' ')}`, async () => {
    try {
      await mustRun('apt-get', ['update', '-q'], { env });
      await mustRun('apt-get', ['install', '-y', '-q', '--no-install-recommends', ...names], {
        env,
      });
    } catch (error) {
      if (error instanceof Stop) throw error;
      say(error.message);
      throw new Stop(
        `${why}, and installing it failed (see above): mend that, or type "${command}".`,
      );
    }
  });
}

/** Debian's package would start a cluster of its own on 5432, which nobody here asked for. */
async function keepFromMakingACluster() {
  const folder = '/etc/postgresql-common/createcluster.d';
  const file = path.join(folder, 'clamptide.conf');
  if (existsSync(file)) return;
  await mkdir(folder, { recursive: true });
  await writeFile(file, 'create_main_cluster = false\n');
}
