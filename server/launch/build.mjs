import { existsSync } from 'node:fs';
import { mkdir, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import path from 'node:path';
import { run } from './children.mjs';
import { contentHash } from './content-hash.mjs';
import { needFree, saysDiskFull } from './disk.mjs';
import { withLock } from './lock.mjs';
import { root } from './root.mjs';
import { say, saySlow } from './say.mjs';
import { Stop } from './stop.mjs';

const WEB = ['apps/web', 'shared', 'schema', 'package-lock.json', 'angular.json', 'tsconfig.json'];
const SERVER = ['server', 'shared', 'drizzle', 'package-lock.json', 'tsconfig.json'];

/**
 * Builds what is stale into dist/: `web`, the app as the browser gets it, and `server`, one file an entry; both names with
 * `prefix` before them. Answers which of the two were built.
 */
export async function buildWhenStale(prefix = '') {
  const dist = path.join(root, 'dist');
  await mkdir(dist, { recursive: true });
  const work = async () => ({
    web: await buildPart(path.join(dist, `${prefix}web`), WEB, 'the web app', buildWeb),
    server: await buildPart(path.join(dist, `${prefix}server`), SERVER, 'the server', buildServer),
  });
  // One lock for all of dist/: two builds at once would fight over the build cache.
  const lock = path.join(dist, 'build.lock');
  return withLock(lock, work, () => say('Waiting for another build to end ...'));
}

/** Builds beside the old result and swaps the two, so that no half-built folder is ever served or taken for fresh. */
async function buildPart(target, sources, name, build) {
  const hash = await contentHash(sources);
  const stamp = await readFile(path.join(target, '.stamp'), 'utf8').catch(() => null);
  if (stamp === hash) return false;
  const making = `${target}.making`;
  const old = `${target}.old`;
  await needFree(root, 300, `building ${name}`);
  await rm(making, { recursive: true, force: true });
  await saySlow(`Building ${name}`, () => build(making));
  await writeFile(path.join(making, '.stamp'), hash);
  await rm(old, { recursive: true, force: true });
  if (existsSync(target)) await rename(target, old);
  await rename(making, target);
  await rm(old, { recursive: true, force: true });
  return true;
}

async function buildWeb(folder) {
  const whole = `${folder}.ng`;
  const args = [
    'build',
    '--configuration=production',
    '--progress=false',
    `--output-path=${whole}`,
  ];
  await mustBuild('the web app', [path.join(root, 'node_modules/@angular/cli/bin/ng.js'), ...args]);
  await rename(path.join(whole, 'browser'), folder);
  await rm(whole, { recursive: true, force: true });
}

async function buildServer(folder) {
  const entries = ['server/main.ts', 'server/work/plan-worker.ts'].filter((entry) =>
    existsSync(path.join(root, entry)),
  );
  const { build } = createRequire(path.join(root, 'package.json'))('esbuild');
  await build({
    absWorkingDir: root,
    entryPoints: Object.fromEntries(entries.map((entry) => [path.basename(entry, '.ts'), entry])),
    outdir: folder,
    outExtension: { '.js': '.mjs' },
    bundle: true,
    packages: 'external',
    platform: 'node',
    format: 'esm',
    target: 'node20',
    sourcemap: true,
    logLevel: 'silent',
  }).catch((error) => {
    throw buildProblem('the server', error.message);
  });
}

async function mustBuild(name, args) {
  const env = { ...process.env, NG_CLI_ANALYTICS: 'false', NO_COLOR: '1', FORCE_COLOR: '0' };
  const { code, output } = await run(process.execPath, args, { cwd: root, env });
  if (code !== 0) throw buildProblem(name, output.trim());
  const warnings = output.split('\n').filter((line) => line.includes('[WARNING]'));
  for (const line of warnings) say(`  ${line.trim()}`);
}

function buildProblem(name, output) {
  if (saysDiskFull({ message: output })) {
    return new Stop(`The disk is full: free some space and start again; no data was harmed.`);
  }
  say(output);
  return new Stop(`Building ${name} failed (see above): mend that and start again.`);
}
