/**
 * `npm test`: every gate, or those that are named (`npm test -- unit api`); `--deep` runs the same tests deeper. It uses
 * nothing but Node's own modules, because it runs before the packages are there.
 */
import { allowChildren, endChildren } from '../server/launch/children.mjs';
import { installPackagesWhenStale } from '../server/launch/packages.mjs';
import { hasPostgres, installPackages } from '../server/launch/postgres.mjs';
import { root } from '../server/launch/root.mjs';
import { say } from '../server/launch/say.mjs';
import { Stop } from '../server/launch/stop.mjs';
import { chromiumOnPath, findChromium } from './gates/chromium.mjs';
import { gates } from './gates/gates.mjs';
import { startThrowAway } from './throw-away.mjs';

const names = process.argv.slice(2).filter((argument) => !argument.startsWith('--'));
const total = { passed: 0, failed: 0 };
let endDatabase = async () => {};
let interrupted = false;

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => {
    interrupted = true;
    endChildren();
  });
}

const explain = (error) => (error instanceof Stop ? error.message : error.stack);

function chosenGates() {
  const unknown = names.filter((name) => !gates.some((gate) => gate.name === name));
  if (unknown.length > 0) {
    throw new Stop(
      `There is no gate "${unknown.join('", "')}": the gates are ${gates.map((gate) => gate.name).join(', ')}.`,
    );
  }
  return names.length === 0 ? gates : gates.filter((gate) => names.includes(gate.name));
}

/** Both programs at once, so that whoever may not install them is told one command. */
async function installPrograms(needs) {
  const missing = [
    ...(needs.has('database') && !(await hasPostgres()) ? ['postgresql'] : []),
    ...(needs.has('chromium') && !process.env.TEST_CHROMIUM && !chromiumOnPath()
      ? ['chromium']
      : []),
  ];
  if (missing.length === 0) return;
  await installPackages(missing, `The tests use what is not installed (${missing.join(', ')})`);
}

/** What the chosen gates need from the machine, before the first of them runs. */
async function prepare(chosen) {
  const needs = new Set(chosen.flatMap((gate) => gate.needs ?? []));
  await installPackagesWhenStale();
  await installPrograms(needs);
  if (needs.has('chromium')) process.env.TEST_CHROMIUM = await findChromium();
  if (needs.has('database')) {
    const cluster = await startThrowAway();
    endDatabase = cluster.end;
    process.env.TEST_ADMIN_DATABASE_URL = cluster.url;
    // What an interrupted test leaves about, clusters of its own included, goes with the folder.
    process.env.TMPDIR = cluster.folder;
  }
}

async function runGate(gate) {
  const started = Date.now();
  const result = await gate.run().catch((error) => {
    if (interrupted) throw error;
    return { passed: 0, failed: 1, output: explain(error) };
  });
  if (gate.name === 'build') process.env.TEST_BUILT = result.failed > 0 ? 'failed' : 'yes';
  total.passed += result.passed;
  total.failed += result.failed;
  if (result.failed > 0) say(`\n${result.output.trim()}\n`);
  const seconds = ((Date.now() - started) / 1000).toFixed(1).padStart(6);
  const counts = `${result.passed} passed, ${result.failed} failed`;
  const note = result.note ? ` (${result.note})` : '';
  say(
    `${result.failed > 0 ? 'FAILED' : 'ok    '} ${gate.name.padEnd(10)} ${seconds} s   ${counts}${note}`,
  );
}

try {
  process.chdir(root);
  if (process.argv.includes('--deep')) process.env.DEEP = '1';
  const chosen = chosenGates();
  const started = Date.now();
  await prepare(chosen);
  say(`prepared in ${((Date.now() - started) / 1000).toFixed(1)} s`);
  for (const gate of chosen) await runGate(gate);
} catch (error) {
  // What keeps the gates from running at all is a failure of its own.
  total.failed += 1;
  say(`\n${interrupted ? 'Interrupted.' : explain(error)}\n`);
}
allowChildren();
await endDatabase().catch((error) => {
  total.failed += 1;
  say(explain(error));
});
say(`${total.passed} passed, ${total.failed} failed`);
process.exit(total.failed > 0 ? 1 : 0);
