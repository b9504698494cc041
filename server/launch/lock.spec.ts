import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { takeLock, withLock } from './lock.mjs';

let folder: string;
let file: string;

beforeEach(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'clamptide-lock-'));
  file = path.join(folder, 'lock');
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('a lock', () => {
  it('is given to one, and again once it was given back', async () => {
    const release = await takeLock(file);
    expect(release).not.toBeNull();
    expect(await takeLock(file)).toBeNull();
    await release?.();
    const again = await takeLock(file);
    expect(again).not.toBeNull();
  });

  it.each([
    ['whose process is gone', '999999999 1 x'],
    ['whose number another process has now', `${process.pid} 1 x`],
    ['that was written half', ''],
  ])('%s is taken over', async (_, content) => {
    await writeFile(file, content);
    expect(await takeLock(file)).not.toBeNull();
    expect(await readFile(file, 'utf8')).toMatch(new RegExp(`^${process.pid} `));
  });

  it('that is stale goes to one of many', async () => {
    await writeFile(file, '999999999 1 x');
    const all = await Promise.all(Array.from({ length: 8 }, () => takeLock(file)));
    expect(all.filter((one) => one !== null)).toHaveLength(1);
  });

  it('makes work wait its turn', async () => {
    const order: string[] = [];
    const release = await takeLock(file);
    const waiting = withLock(
      file,
      async () => order.push('second'),
      () => order.push('waits'),
    );
    while (order.length === 0) await new Promise((resolve) => setTimeout(resolve, 5));
    order.push('first ends');
    await release?.();
    await waiting;
    expect(order).toEqual(['waits', 'first ends', 'second']);
  });
});
