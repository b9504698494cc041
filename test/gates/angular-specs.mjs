import { mkdir, readdir, readFile, rm } from 'node:fs/promises';
import path from 'node:path';
import { run } from '../../server/launch/children.mjs';
import { root } from '../../server/launch/root.mjs';
import { countReport } from './run-vitest.mjs';

/** The app's own specs need Angular's compiler, so its builder runs them; null when there are none. */
export async function angularSpecs() {
  const names = await readdir(path.join(root, 'apps/web/src'), { recursive: true });
  if (!names.some((name) => name.endsWith('.spec.ts'))) return null;
  const report = path.join(root, 'dist', 'reports', 'web.json');
  await mkdir(path.dirname(report), { recursive: true });
  await rm(report, { force: true });
  const { code, output } = await run(
    process.execPath,
    [
      ...['node_modules/@angular/cli/bin/ng.js', 'test', '--watch=false', '--progress=false'],
      ...['--reporters=json', `--output-file=${report}`],
    ],
    { cwd: root, env: { ...process.env, NO_COLOR: '1', NG_CLI_ANALYTICS: 'false' }, cap: 600 },
  );
  return {
    ...(await countReport(report, code)),
    output: `${output}\n${await failureMessages(report)}`,
  };
}

async function failureMessages(report) {
  const text = await readFile(report, 'utf8').catch(() => '{"testResults":[]}');
  return JSON.parse(text)
    .testResults.flatMap((file) => [
      ...(file.message ? [`${file.name}\n${file.message}`] : []),
      ...file.assertionResults
        .filter((one) => one.status === 'failed')
        .map((one) => `${one.fullName}\n${one.failureMessages.join('\n')}`),
    ])
    .join('\n\n');
}
