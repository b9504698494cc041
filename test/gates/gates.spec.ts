import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { compare } from './generated.mjs';
import { refused } from './lock.mjs';
import { admits } from './node-range.mjs';
import { countReport } from './run-vitest.mjs';

/* A gate that cannot fail guards nothing: these show that each of our own fails when it should. */

let folder: string;

beforeEach(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'clamptide-gates-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('ranges of Node versions', () => {
  it.each([
    ['>=20.19.0', true],
    ['>=20', true],
    ['>= 18', true],
    ['^20.19.0 || ^22.12.0 || >=24.0.0', true],
    ['18 || 20 || >=22', true],
    ['20.x', true],
    ['18 - 20', true],
    ['*', true],
    ['>=0.10.0', true],
    ['>=22.13.0', false],
    ['^18.0.0', false],
    ['>=20.20', false],
    ['^20.19.1 || >=22', false],
    ['>=14 <20', false],
    ['20.18.x', false],
    ['>20.19', false],
  ])('%s admits 20.19.0: %s', (range, expected) => {
    expect(admits(range, '20.19.0')).toBe(expected);
  });

  it('refuses what it cannot read instead of guessing', () => {
    expect(() => admits('=>20', '20.19.0')).toThrow(/cannot read/);
  });
});

describe('the lock file', () => {
  const packages = {
    '': { version: '1.0.0', engines: { node: '>=22' } },
    'node_modules/old': { version: '1.0.0', engines: { node: '>=18' } },
    'node_modules/a/node_modules/@x/new': { version: '2.0.0', engines: { node: '>=22.13' } },
    'node_modules/silent': { version: '3.0.0' },
  };

  it('names each package that wants a newer Node', () => {
    const lines = refused(packages);
    expect(lines).toHaveLength(2);
    expect(lines[1]).toContain('node_modules/a/node_modules/@x/new 2.0.0 wants Node >=22.13');
  });

  it('lets pass what is allowed by name', () => {
    expect(refused(packages, new Map([['@x/new', 'works']]))).toHaveLength(1);
  });
});

describe('counts of a run', () => {
  const report = (passed: number, failed: number, files: unknown[] = []) =>
    JSON.stringify({ numPassedTests: passed, numFailedTests: failed, testResults: files });
  const unloaded = { status: 'failed', assertionResults: [] };

  it.each([
    ['all is well', report(3, 0), 0, { passed: 3, failed: 0 }],
    ['a test failed', report(2, 1), 1, { passed: 2, failed: 1 }],
    ['no test was found', report(0, 0), 0, { passed: 0, failed: 1 }],
    ['a file did not load', report(2, 0, [unloaded]), 1, { passed: 2, failed: 1 }],
    ['the run ended badly after its tests', report(2, 0), 1, { passed: 2, failed: 1 }],
  ])('when %s', async (_, text, code, expected) => {
    const file = path.join(folder, 'report.json');
    await writeFile(file, text);
    expect(await countReport(file, code)).toEqual(expected);
  });

  it('when there is no report at all', async () => {
    const missing = path.join(folder, 'none.json');
    expect(await countReport(missing, 0)).toEqual({ passed: 0, failed: 1 });
  });
});

describe('generated files', () => {
  it('are compared by name and content, below folders too', async () => {
    for (const side of ['a', 'b']) {
      await mkdir(path.join(folder, side, 'meta'), { recursive: true });
      await writeFile(path.join(folder, side, 'same.ts'), 'x');
    }
    const [a, b] = [path.join(folder, 'a'), path.join(folder, 'b')];
    expect(await compare(a, b)).toEqual([]);
    await writeFile(path.join(a, 'only-here.ts'), '');
    await writeFile(path.join(a, 'meta', 'differs.json'), '1');
    await writeFile(path.join(b, 'meta', 'differs.json'), '2');
    await writeFile(path.join(b, 'only-there.ts'), '');
    expect(await compare(a, b)).toEqual(['meta/differs.json', 'only-here.ts', 'only-there.ts']);
  });
});
