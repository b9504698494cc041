import { randomBytes } from 'node:crypto';
import { link, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { setTimeout as wait } from 'node:timers/promises';

/**
 * Says which process this is beyond its number, which is given again after it ends: with the moment at which the kernel
 * started it and the boot in which it did.
 */
async function identify(pid) {
  try {
    const stat = await readFile(`/proc/${pid}/stat`, 'utf8');
    const boot = await readFile('/proc/sys/kernel/random/boot_id', 'utf8');
    // The name, in brackets, may itself hold spaces; the start time is the 20th field after it.
    const started = stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19];
    return `${pid} ${started} ${boot.trim()}`;
  } catch {
    return null;
  }
}

const isHeld = async (text) => (await identify(Number.parseInt(text, 10))) === text;

/**
 * Takes a lock file for this process: a function that gives it back, or null when another living process holds it.
 * A lock whose process was killed is taken over.
 */
export async function takeLock(file) {
  const mine = await identify(process.pid);
  const draft = `${file}.${randomBytes(6).toString('hex')}`;
  await writeFile(draft, mine);
  try {
    for (let attempt = 0; attempt < 20; attempt += 1) {
      try {
        // A link appears with its content, and only when nothing stands there yet.
        await link(draft, file);
        return () => rm(file, { force: true });
      } catch (error) {
        if (error.code !== 'EEXIST') throw error;
      }
      const theirs = await readFile(file, 'utf8').catch(() => null);
      if (theirs === null) continue;
      if (await isHeld(theirs)) return null;
      await removeStale(file, theirs, `${draft}.stale`);
    }
    return null;
  } finally {
    await rm(draft, { force: true });
  }
}

/** Of several that see the same stale lock one moves it away; whoever moved a fresh one by mistake puts it back. */
async function removeStale(file, expected, aside) {
  try {
    await rename(file, aside);
    if ((await readFile(aside, 'utf8')) !== expected) await link(aside, file);
  } catch (error) {
    if (error.code !== 'ENOENT' && error.code !== 'EEXIST') throw error;
  } finally {
    await rm(aside, { force: true });
  }
}

/** Holds the lock while `work` runs, waiting for whoever has it; `onWait` is called once when it has to wait. */
export async function withLock(file, work, onWait = () => {}) {
  let release = await takeLock(file);
  if (!release) onWait();
  while (!release) {
    await wait(500);
    release = await takeLock(file);
  }
  try {
    return await work();
  } finally {
    await release();
  }
}
