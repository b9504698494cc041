import { allowChildren, endChildren } from './children.mjs';
import { dataFolder, developmentSecret, openDataFolder } from './data-folder.mjs';
import { saysDiskFull } from './disk.mjs';
import { startPrivateCluster } from './private-cluster.mjs';
import { root } from './root.mjs';
import { say } from './say.mjs';
import { Stop } from './stop.mjs';

/** What was begun and has to be ended, the last begun first. */
const endings = [];
let interrupted = false;

/** Has `end` run when the launcher ends, however that comes about. */
export function atEnd(end) {
  endings.push(end);
}

/** Opens the data folder and the database; answers the environment that the server gets on top of ours. */
export async function prepareData() {
  const data = dataFolder();
  atEnd(await openDataFolder(data));
  const env = { CLAMPTIDE_DATA: data };
  if (process.env.NODE_ENV !== 'production') {
    env.CLAMPTIDE_SECRET = process.env.CLAMPTIDE_SECRET || (await developmentSecret(data));
  }
  if (process.env.DATABASE_URL) {
    env.ADMIN_DATABASE_URL = process.env.DATABASE_URL;
  } else {
    const cluster = await startPrivateCluster(data);
    atEnd(cluster.stop);
    env.ADMIN_DATABASE_URL = cluster.url;
  }
  return env;
}

/**
 * Runs a command of the launcher: `work` resolves when there is nothing left to wait for. Whatever happens, what was begun
 * is ended in order. The process ends with 0 after a wished end, 130 after an interrupted start, else 1.
 */
export async function launch(work) {
  process.chdir(root);
  const asked = new Promise((resolve) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
      process.on(signal, () => {
        if (interrupted) return;
        interrupted = true;
        endChildren();
        resolve();
      });
    }
  });
  try {
    await work(asked);
  } catch (error) {
    process.exitCode = interrupted ? 130 : 1;
    if (!interrupted) process.stderr.write(explain(error));
  }
  // Children of an ended start, such as the other half of two, must not outlive it.
  endChildren();
  allowChildren();
  if (interrupted) say('Stopping ...');
  for (const end of endings.reverse()) {
    await end().catch((error) => process.stderr.write(explain(error)));
  }
  if (interrupted) say('Stopped.');
  process.exit();
}

/** A sentence for what a person can mend, a stack for what they should report. */
function explain(error) {
  if (error instanceof Stop) return error.message && `\n${error.message}\n`;
  if (saysDiskFull(error)) {
    return '\nThe disk is full: free some space and start again; no data was harmed.\n';
  }
  return `\n${error.stack}\n`;
}
