import { mkdir, readFile, rm } from 'node:fs/promises';
import path from 'node:path';
import { run } from '../../server/launch/children.mjs';
import { root } from '../../server/launch/root.mjs';

/** Runs one project of test/vitest.config.ts and answers `{ passed, failed, output }` from vitest's own report. */
export async function runVitest(project, { env = {}, cap } = {}) {
  const report = path.join(root, 'dist', 'reports', `${project}.json`);
  await mkdir(path.dirname(report), { recursive: true });
  await rm(report, { force: true });
  const { code, output } = await run(
    process.execPath,
    [
      ...['node_modules/vitest/vitest.mjs', 'run', '--config=test/vitest.config.ts'],
      ...[`--project=${project}`, '--reporter=default', '--reporter=json'],
      `--outputFile.json=${report}`,
    ],
    { cwd: root, env: { ...process.env, NO_COLOR: '1', ...env }, cap },
  );
  return { ...(await countReport(report, code)), output };
}

/**
 * Counts of a JSON report. A file that could not be loaded counts as one failed test, as does a run that ended badly though
 * every test passed, or that found no test at all: silence is never success.
 */
export async function countReport(report, code) {
  const text = await readFile(report, 'utf8').catch(() => null);
  if (text === null) return { passed: 0, failed: 1 };
  const { numPassedTests: passed, numFailedTests, testResults } = JSON.parse(text);
  const unloaded = testResults.filter(
    (file) =>
      file.status === 'failed' && !file.assertionResults.some((one) => one.status === 'failed'),
  );
  const failed = numFailedTests + unloaded.length;
  const silent = failed === 0 && (code !== 0 || passed === 0);
  return { passed, failed: silent ? 1 : failed };
}
