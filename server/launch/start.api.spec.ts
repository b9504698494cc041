import { spawn } from 'node:child_process';
import { chmod, mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { TEST_BUILD } from '../../test/test-settings.mjs';
import { runningServer } from './cluster.mjs';
import { freePort } from './free-port.mjs';
import { root } from './root.mjs';

/* The whole of `npm start`, as a person has it: one process that is started, spoken to and ended. */

let data: string;
let started: Started[] = [];

interface Started {
  /** All it has said so far. */
  output(): string;
  url: string;
  /** Resolves with the exit code. */
  ended: Promise<number | null>;
  signal(name: NodeJS.Signals): void;
}

beforeEach(async () => {
  data = await mkdtemp(path.join(tmpdir(), 'clamptide-data-'));
  await chmod(data, 0o711);
});
afterEach(async () => {
  for (const one of started) one.signal('SIGTERM');
  await Promise.all(started.map((one) => one.ended));
  started = [];
  await rm(data, { recursive: true, force: true });
});

async function start(env: Record<string, string> = {}): Promise<Started> {
  const port = await freePort();
  const child = spawn(process.execPath, ['server/launch/start.mjs'], {
    cwd: root,
    env: {
      ...process.env,
      ...{ NODE_ENV: 'development', PORT: `${port}`, PUBLIC_URL: '', DATABASE_URL: '' },
      ...{ CLAMPTIDE_DATA: data, CLAMPTIDE_BUILD: TEST_BUILD, CLAMPTIDE_SECRET: '', SMTP_URL: '' },
      ...env,
    },
  });
  let output = '';
  child.stdout.on('data', (more: Buffer) => (output += more.toString()));
  child.stderr.on('data', (more: Buffer) => (output += more.toString()));
  const one: Started = {
    output: () => output,
    url: `http://localhost:${port}`,
    ended: new Promise((resolve) => child.once('close', resolve)),
    signal: (name) => void child.kill(name),
  };
  started.push(one);
  return one;
}

/** Waits until it says something, or has ended without. */
async function until(one: Started, words: string): Promise<void> {
  let over = false;
  void one.ended.then(() => (over = true));
  while (!one.output().includes(words)) {
    if (over) throw new Error(`ended without "${words}"\n${one.output()}`);
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

const isServed = (url: string) =>
  fetch(`${url}/livez`).then(
    (response) => response.ok,
    () => false,
  );

describe('npm start', { timeout: 180_000 }, () => {
  it('serves, refuses a second one on the same data, ends cleanly and starts again', async () => {
    const first = await start();
    await until(first, 'is ready');
    expect(await isServed(first.url)).toBe(true);
    expect((await fetch(`${first.url}/readyz`)).status).toBe(200);
    const secret = await readFile(path.join(data, 'secret'), 'utf8');
    expect(first.output()).not.toContain(secret.trim().slice(3));

    const second = await start();
    expect(await second.ended).toBe(1);
    expect(second.output()).toContain('Another "npm start" runs on the data');
    expect(await isServed(first.url)).toBe(true);

    first.signal('SIGINT');
    expect(await first.ended).toBe(0);
    expect(await isServed(first.url)).toBe(false);
    expect(await runningServer(path.join(data, 'postgres'))).toBeNull();

    const again = await start({ CLAMPTIDE_DEMO: 'off' });
    await until(again, 'is ready');
    expect(again.output()).not.toContain('Making a PostgreSQL');
    again.signal('SIGTERM');
    expect(await again.ended).toBe(0);
  });

  it('takes its server along when it is killed, and is picked up by the next', async () => {
    const first = await start({ CLAMPTIDE_DEMO: 'off' });
    await until(first, 'is ready');
    first.signal('SIGKILL');
    await first.ended;
    while (await isServed(first.url)) await new Promise((resolve) => setTimeout(resolve, 50));
    const next = await start({ CLAMPTIDE_DEMO: 'off' });
    await until(next, 'is ready');
    expect(next.output()).toContain('Taking over the database server');
  });

  it('refuses production with one sentence that names all that is missing', async () => {
    const one = await start({ NODE_ENV: 'production' });
    expect(await one.ended).toBe(1);
    expect(one.output().trim().split('\n')).toHaveLength(1);
    for (const name of ['DATABASE_URL', 'PUBLIC_URL', 'CLAMPTIDE_SECRET', 'SMTP_URL']) {
      expect(one.output()).toContain(name);
    }
  });

  it('passes on the sentence of a server that was set up wrongly', async () => {
    const one = await start({ CLAMPTIDE_SECRET: 'k1:short' });
    expect(await one.ended).toBe(1);
    expect(one.output()).toContain('CLAMPTIDE_SECRET must be');
    expect(one.output()).not.toMatch(/^\s+at /m);
  });
});
