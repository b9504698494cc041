import { mkdtemp, readdir, readFile, rm, stat, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { parseSecrets } from '#server/settings/settings';
import { developmentSecret, openDataFolder } from './data-folder.mjs';
import { Stop } from './stop.mjs';

let parent: string;
let folder: string;

beforeEach(async () => {
  parent = await mkdtemp(path.join(tmpdir(), 'clamptide-data-'));
  folder = path.join(parent, 'data');
});
afterEach(() => rm(parent, { recursive: true, force: true }));

describe('the data folder', () => {
  it('is made, and opened again', async () => {
    await (
      await openDataFolder(folder)
    )();
    await (
      await openDataFolder(folder)
    )();
    expect(await readFile(path.join(folder, 'version'), 'utf8')).toBe('1\n');
  });

  it('belongs to one start at a time', async () => {
    const release = await openDataFolder(folder);
    await expect(openDataFolder(folder)).rejects.toThrow(/Another "npm start"/);
    await release();
  });

  it.each(['2', '99', 'soon'])('of format %s is left as it is', async (version) => {
    await (
      await openDataFolder(folder)
    )();
    await writeFile(path.join(folder, 'version'), version);
    await writeFile(path.join(folder, 'kept'), 'x');
    await expect(openDataFolder(folder)).rejects.toThrow(/newer version/);
    await expect(openDataFolder(folder)).rejects.toBeInstanceOf(Stop);
    expect(await readFile(path.join(folder, 'version'), 'utf8')).toBe(version);
    expect((await readdir(folder)).sort()).toEqual(['kept', 'version']);
  });

  it('that cannot be a folder ends in a sentence', async () => {
    await writeFile(folder, 'a file stands here');
    await expect(openDataFolder(folder)).rejects.toThrow(/CLAMPTIDE_DATA/);
  });
});

describe('the secret of development', () => {
  it('is made once, for its owner alone, as the server reads it', async () => {
    await (
      await openDataFolder(folder)
    )();
    const secret = await developmentSecret(folder);
    expect(parseSecrets(secret)[0].key).toHaveLength(32);
    expect(await developmentSecret(folder)).toBe(secret);
    expect((await stat(path.join(folder, 'secret'))).mode & 0o777).toBe(0o600);
  });
});
