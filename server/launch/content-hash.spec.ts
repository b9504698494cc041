import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { contentHash } from './content-hash.mjs';
import { root } from './root.mjs';

let folder: string;
let name: string;

beforeEach(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'clamptide-hash-'));
  name = path.relative(root, folder);
  await writeFile(path.join(folder, 'a.ts'), 'one');
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('the hash of what a build is made of', () => {
  it('stays while nothing changes', async () => {
    expect(await contentHash([name])).toBe(await contentHash([name]));
  });

  it.each<[string, () => Promise<void>]>([
    ['a content changes', () => writeFile(path.join(folder, 'a.ts'), 'two')],
    ['a file comes', () => writeFile(path.join(folder, 'b.ts'), '')],
    ['a file goes', () => rm(path.join(folder, 'a.ts'))],
  ])('changes when %s', async (_, change) => {
    const before = await contentHash([name]);
    await change();
    expect(await contentHash([name])).not.toBe(before);
  });

  it('does not see specs, which no build contains', async () => {
    const before = await contentHash([name]);
    await writeFile(path.join(folder, 'a.spec.ts'), 'x');
    expect(await contentHash([name])).toBe(before);
  });

  it('takes what is missing for empty', async () => {
    expect(await contentHash(['no-such-folder'])).toBe(await contentHash([]));
  });
});
