import { spawn } from 'node:child_process';
import { readdir } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

/* `npm run bench NAME` runs test/bench/NAME.ts: it prints figures and judges nothing. */

const folder = path.dirname(fileURLToPath(import.meta.url));
const [name = '', ...rest] = process.argv.slice(2);
const names = (await readdir(folder))
  .filter((file) => file.endsWith('.bench.ts'))
  .map((file) => file.replace('.bench.ts', ''))
  .sort();
if (!names.includes(name)) {
  process.stderr.write(`Usage: npm run bench -- NAME, where NAME is one of: ${names.join(', ')}\n`);
  process.exit(2);
}
const child = spawn(
  process.execPath,
  ['--import', 'tsx', path.join(folder, `${name}.bench.ts`), ...rest],
  { stdio: 'inherit' },
);
child.on('exit', (code, signal) => process.exit(signal ? 1 : (code ?? 1)));
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => child.kill(signal));
