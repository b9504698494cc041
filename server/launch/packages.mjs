import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { run } from './children.mjs';
import { needFree, saysDiskFull } from './disk.mjs';
import { withLock } from './lock.mjs';
import { root } from './root.mjs';
import { say, saySlow } from './say.mjs';
import { Stop } from './stop.mjs';

const lockFile = path.join(root, 'package-lock.json');
const modules = path.join(root, 'node_modules');
const stampFile = path.join(modules, '.clamptide-lock');

const lockHash = async () =>
  createHash('sha256')
    .update(await readFile(lockFile))
    .digest('hex');
const readStamp = () => readFile(stampFile, 'utf8').catch(() => null);

/** Installs the packages when they are missing or are not those of package-lock.json. */
export async function installPackagesWhenStale() {
  if ((await readStamp()) === (await lockHash())) return;
  await mkdir(path.join(root, 'dist'), { recursive: true });
  await withLock(
    path.join(root, 'dist', 'install.lock'),
    async () => {
      const hash = await lockHash();
      // Another start may have installed them while this one waited, or a developer with "npm install".
      if ((await readStamp()) === hash) return;
      if (!(await isInstalledAsLocked())) await install();
      await writeFile(stampFile, hash);
    },
    () => say('Waiting for another start that installs the packages ...'),
  );
}

async function install() {
  await needFree(root, 1200, 'installing the npm packages');
  const why = existsSync(modules) ? 'stale' : 'missing';
  await saySlow(`The npm packages are ${why}: installing them (a minute or two)`, async () => {
    // Building needs the development packages too, whatever NODE_ENV says.
    const args = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
    const { code, output } = await run('npm', args, { cwd: root });
    if (code === 0) return;
    say(output.trim());
    if (saysDiskFull({ message: output }))
      await needFree(root, 1200, 'installing the npm packages');
    throw new Stop(
      '"npm ci" failed (see above): is the npm registry reachable? Start again when it is.',
    );
  });
}

/** Whether npm's own record of what it installed agrees with package-lock.json. */
async function isInstalledAsLocked() {
  const record = await readJson(path.join(modules, '.package-lock.json'));
  if (!record) return false;
  const { packages: wanted } = await readJson(lockFile);
  const present = record.packages;
  const same = (place) => present[place]?.version === wanted[place]?.version;
  const needed = Object.keys(wanted).filter((place) => place && !wanted[place].optional);
  return needed.every((place) => present[place] && same(place)) && Object.keys(present).every(same);
}

const readJson = async (file) => JSON.parse(await readFile(file, 'utf8').catch(() => 'null'));
