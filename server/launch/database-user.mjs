import { chown, mkdir, rm } from 'node:fs/promises';
import { run } from './children.mjs';
import { Stop } from './stop.mjs';

/** PostgreSQL refuses to run as root, so root hands its cluster to the user that Debian's package makes. */
const NAME = 'postgres';

/** Whether this process is root and must drop its rights for everything that touches the cluster. */
export const isRoot = process.getuid?.() === 0;

/** Runs a program of PostgreSQL with the rights of the cluster's owner. */
export function runAsOwner(command, args, options = {}) {
  // The working folder may be one that the owner cannot enter; PostgreSQL's programs then complain.
  const from = { cwd: '/', ...options };
  if (!isRoot) return run(command, args, from);
  const drop = [`--reuid=${NAME}`, `--regid=${NAME}`, '--init-groups'];
  return run('setpriv', [...drop, '--', command, ...args], from);
}

let owner;

/** The numeric ids of the cluster's owner. */
export async function ownerIds() {
  if (!isRoot) return { uid: process.getuid(), gid: process.getgid() };
  if (owner) return owner;
  const uid = await run('id', ['-u', NAME]);
  const gid = await run('id', ['-g', NAME]);
  if (uid.code !== 0 || gid.code !== 0) {
    throw new Stop(
      `PostgreSQL is here but its user "${NAME}" is not: run "apt-get install --reinstall postgresql" or start as another user than root.`,
    );
  }
  owner = { uid: Number(uid.stdout), gid: Number(gid.stdout) };
  return owner;
}

/** Makes a folder that only the cluster's owner may enter. */
export async function makeOwnFolder(folder) {
  const { uid, gid } = await ownerIds();
  await mkdir(folder, { recursive: true, mode: 0o700 });
  if (isRoot) await chown(folder, uid, gid);
}

/** Whether the cluster's owner can really work in the folder: found by writing there, not by reading modes. */
export async function canWorkIn(folder) {
  try {
    await makeOwnFolder(folder);
  } catch (error) {
    if (error instanceof Stop) throw error;
    return false;
  }
  const probe = await runAsOwner('sh', ['-c', 'cd "$1" && : > .probe && rm .probe', 'sh', folder]);
  if (probe.code === 0) return true;
  await rm(folder, { recursive: false }).catch(() => {});
  return false;
}
