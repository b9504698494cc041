import { existsSync } from 'node:fs';
import { chmod, mkdir, mkdtemp, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { mustRun } from './children.mjs';
import { dataOf, runningServer } from './cluster.mjs';
import { isRoot } from './database-user.mjs';
import { startPrivateCluster } from './private-cluster.mjs';

/*
 * Faults that a cluster of one's own meets: each ends in a running database with its rows, or in a sentence and unharmed
 * files.
 */

/** A data folder with a cluster that was made, started and stopped: most tests begin with a copy, which is quicker. */
let made: string;
let data: string;
let stops: (() => Promise<void>)[] = [];

const newFolder = async () => {
  const folder = await mkdtemp(path.join(tmpdir(), 'clamptide-data-'));
  await chmod(folder, 0o711);
  return folder;
};

beforeAll(async () => {
  made = await newFolder();
  await (await startPrivateCluster(made)).stop();
});
afterAll(() => rm(made, { recursive: true, force: true }));

beforeEach(async () => {
  data = await newFolder();
});
afterEach(async () => {
  for (const stop of stops.reverse()) await stop();
  stops = [];
  await rm(data, { recursive: true, force: true });
});

/** Fills the data folder with a cluster. Node's own copy would not keep whom the files belong to. */
async function withCluster() {
  await mustRun('cp', ['-a', `${made}/.`, data]);
}

async function start() {
  const cluster = await startPrivateCluster(data);
  stops.push(cluster.stop);
  return cluster;
}

async function ask(url: string, sql: string): Promise<unknown> {
  const client = new pg.Client({ connectionString: url });
  // A server that is killed below ends its connections with an error event.
  client.on('error', () => undefined);
  await client.connect();
  try {
    const { rows } = await client.query<{ answer: unknown }>(sql);
    return rows[0]?.answer;
  } finally {
    await client.end();
  }
}

const folder = () => path.join(data, 'postgres');
const keepRow = (url: string) => ask(url, 'create table kept as select 7 as answer');
const readRow = (url: string) => ask(url, 'select answer from kept');

describe('a private cluster', () => {
  it('keeps its rows and its port over a stop', async () => {
    await withCluster();
    const first = await start();
    await keepRow(first.url);
    await first.stop();
    expect(await runningServer(folder())).toBeNull();
    const second = await start();
    expect(second.url).toBe(first.url);
    expect(await readRow(second.url)).toBe(7);
  });

  it('wants the password and listens on loopback alone', async () => {
    await withCluster();
    const { url } = await start();
    const wrong = new URL(url);
    wrong.password = 'guess';
    await expect(ask(wrong.href, 'select 1')).rejects.toThrow(/password authentication failed/);
    expect(await ask(url, "select current_setting('listen_addresses') as answer")).toBe(
      '127.0.0.1',
    );
  });

  it('is taken over when its start was killed and it was left running', async () => {
    await withCluster();
    const first = await start();
    await keepRow(first.url);
    const second = await start();
    expect(second.url).toBe(first.url);
    expect(await readRow(second.url)).toBe(7);
  });

  it('comes up again after it was killed', async () => {
    await withCluster();
    const { url } = await start();
    await keepRow(url);
    const { pid } = (await runningServer(folder())) ?? { pid: 0 };
    expect(pid).toBeGreaterThan(1);
    process.kill(pid, 'SIGKILL');
    expect(await readRow((await start()).url)).toBe(7);
  });

  it('is not fooled by a lock file whose number another program has now', async () => {
    await withCluster();
    const first = await start();
    await keepRow(first.url);
    await first.stop();
    const file = path.join(dataOf(folder()), 'postmaster.pid');
    await writeFile(file, `${process.pid}\n${dataOf(folder())}\n1\n5432\n\n127.0.0.1\n\nready\n`);
    expect(await readRow((await start()).url)).toBe(7);
  });

  it('goes to another port when its own is taken', async () => {
    await withCluster();
    const first = await start();
    await keepRow(first.url);
    await first.stop();
    const port = Number(new URL(first.url).port);
    const squatter = createServer().listen(port, '127.0.0.1');
    await new Promise((resolve) => squatter.once('listening', resolve));
    try {
      const second = await start();
      expect(new URL(second.url).port).not.toBe(`${port}`);
      expect(await readRow(second.url)).toBe(7);
    } finally {
      squatter.close();
    }
  });

  it('begins again after its making was interrupted', async () => {
    await mkdir(path.join(folder(), 'making', 'base'), { recursive: true });
    await writeFile(path.join(folder(), 'making', 'PG_VERSION'), '15\n');
    const { url } = await start();
    expect(await ask(url, 'select 1 as answer')).toBe(1);
    expect(existsSync(path.join(folder(), 'making'))).toBe(false);
  });

  it('of another PostgreSQL is left as it is', async () => {
    await withCluster();
    const file = path.join(dataOf(folder()), 'PG_VERSION');
    await writeFile(file, '99\n');
    await expect(start()).rejects.toThrow(/PostgreSQL 99.*postgresql-99.*nothing was changed/s);
    expect(await readFile(file, 'utf8')).toBe('99\n');
  });

  it('whose files are gone is not replaced by an empty one', async () => {
    await withCluster();
    await writeFile(path.join(data, 'postgres-folder'), `${folder()}\n`);
    await rename(dataOf(folder()), path.join(folder(), 'moved'));
    await expect(start()).rejects.toThrow(/is gone/);
    expect(existsSync(dataOf(folder()))).toBe(false);
  });

  it('whose password is gone says which file to put back', async () => {
    await withCluster();
    await rm(path.join(data, 'postgres-password'));
    await expect(start()).rejects.toThrow(/postgres-password/);
    expect(existsSync(path.join(data, 'postgres-password'))).toBe(false);
  });

  it('moves out of a folder that its user cannot enter, and is found there again', async () => {
    // Only root hands the cluster to another user, who may then be locked out.
    await chmod(data, 0o700);
    const first = await start();
    const pointer = await readFile(path.join(data, 'postgres-folder'), 'utf8').catch(() => null);
    try {
      expect(pointer !== null).toBe(isRoot);
      await keepRow(first.url);
      await first.stop();
      expect(await readRow((await start()).url)).toBe(7);
    } finally {
      for (const stop of stops.reverse()) await stop();
      stops = [];
      if (pointer) await rm(pointer.trim(), { recursive: true });
    }
  });
});
