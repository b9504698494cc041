import { randomBytes } from 'node:crypto';
import { chmod, mkdir, readFile, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { takeLock } from './lock.mjs';
import { root } from './root.mjs';
import { Stop } from './stop.mjs';

/** The layout of the data folder that this code reads and writes. Raise it when older code must not touch newer data. */
const FORMAT = 1;

/** Where this checkout keeps what must survive: the cluster, the secret, files. */
export function dataFolder() {
  return path.resolve(root, process.env.CLAMPTIDE_DATA || '.data');
}

/** Makes or opens the data folder and locks it for this process; answers the function that gives the lock back. */
export async function openDataFolder(folder) {
  try {
    // The owner of the cluster passes through on its way to its own folder, and sees nothing else here.
    await mkdir(folder, { recursive: true });
    await chmod(folder, 0o711);
    const release = await takeLock(path.join(folder, 'lock'));
    if (!release) {
      throw new Stop(
        `Another "npm start" runs on the data in ${folder}: stop that one, or set CLAMPTIDE_DATA to another folder and PORT to another port.`,
      );
    }
    try {
      await checkFormat(folder);
    } catch (error) {
      await release();
      throw error;
    }
    return release;
  } catch (error) {
    if (!['EACCES', 'EPERM', 'EROFS', 'ENOTDIR', 'EEXIST'].includes(error.code)) throw error;
    throw new Stop(
      `The data folder ${folder} cannot be used (${error.code}): start as the user who made it, or set CLAMPTIDE_DATA to another folder.`,
    );
  }
}

async function checkFormat(folder) {
  const file = path.join(folder, 'version');
  const text = await readFile(file, 'utf8').catch((error) => {
    if (error.code === 'ENOENT') return null;
    throw error;
  });
  if (text === null) {
    await writeFile(file, `${FORMAT}\n`);
    return;
  }
  const version = Number(text);
  if (Number.isInteger(version) && version >= 1 && version <= FORMAT) return;
  throw new Stop(
    `The data in ${folder} were written by a newer version (format ${text.trim().slice(0, 20)}, this one knows ${FORMAT}): start that version, or set CLAMPTIDE_DATA to another folder; nothing was changed.`,
  );
}

/** Reads a small private file of the data folder, making it the first time. */
export async function readOrMake(file, make) {
  try {
    return (await readFile(file, 'utf8')).trim();
  } catch (error) {
    if (error.code !== 'ENOENT') throw error;
  }
  const value = make();
  await writeFile(file, `${value}\n`, { mode: 0o600, flag: 'wx' });
  return value;
}

/** The key with which development encrypts what it stores; production brings its own. */
export function developmentSecret(folder) {
  return readOrMake(path.join(folder, 'secret'), () => `k1:${randomBytes(32).toString('hex')}`);
}
