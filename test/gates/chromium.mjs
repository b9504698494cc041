import { existsSync } from 'node:fs';
import path from 'node:path';
import { installPackages } from '../../server/launch/postgres.mjs';
import { Stop } from '../../server/launch/stop.mjs';

/** The browser for the tests: TEST_CHROMIUM, or Debian's, which is installed when it is missing and this process may. */
export async function findChromium() {
  const chosen = process.env.TEST_CHROMIUM;
  if (chosen) {
    if (existsSync(chosen)) return chosen;
    throw new Stop(`TEST_CHROMIUM names ${chosen}, which does not exist: correct or unset it.`);
  }
  const before = chromiumOnPath();
  if (before) return before;
  await installPackages(['chromium'], 'Chromium, which the browser tests use, is not installed');
  const after = chromiumOnPath();
  if (after) return after;
  throw new Stop(
    'Debian\'s package "chromium" brought no program of that name: set TEST_CHROMIUM to a browser.',
  );
}

/** Debian's Chromium on this machine, if it is here. */
export function chromiumOnPath() {
  const folders = [...(process.env.PATH ?? '').split(':'), '/usr/bin'];
  return folders.map((folder) => path.join(folder, 'chromium')).find((file) => existsSync(file));
}
