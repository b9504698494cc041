import { existsSync } from 'node:fs';
import path from 'node:path';
import { run } from '../../server/launch/children.mjs';
import { root } from '../../server/launch/root.mjs';

/** Runs a tool from node_modules; a gate without counts of its own is one check. */
async function tool(script, args, options = {}) {
  const node = ['--max-old-space-size=4096', path.join(root, 'node_modules', script)];
  const env = { ...process.env, NO_COLOR: '1', FORCE_COLOR: '0' };
  const { code, output } = await run(process.execPath, [...node, ...args], {
    cwd: root,
    env,
    cap: 600,
    ...options,
  });
  return { passed: code === 0 ? 1 : 0, failed: code === 0 ? 0 : 1, output };
}

const sum = (results) => ({
  passed: results.reduce((total, one) => total + one.passed, 0),
  failed: results.reduce((total, one) => total + one.failed, 0),
  output: results.map((one) => one.output).join('\n'),
});

export const format = () => tool('prettier/bin/prettier.cjs', ['--check', '--log-level=warn', '.']);

export const lint = () =>
  tool('eslint/bin/eslint.js', ['--config=test/eslint.config.js', '--max-warnings=0', '.']);

/** shared/ without the types of any platform, the server with Node's, the app with its templates. */
export async function types() {
  const [shared, server] = await Promise.all([
    tool('typescript/bin/tsc', ['-p', 'shared/tsconfig.json', '--noEmit']),
    tool('typescript/bin/tsc', ['-p', 'server/tsconfig.json', '--noEmit']),
  ]);
  const ngc = '@angular/compiler-cli/bundles/src/bin/ngc.js';
  const app = await tool(ngc, ['-p', 'apps/web/tsconfig.app.json', '--noEmit']);
  const specs = existsSync(path.join(root, 'apps/web/tsconfig.spec.json'))
    ? [await tool('typescript/bin/tsc', ['-p', 'apps/web/tsconfig.spec.json', '--noEmit'])]
    : [];
  return sum([shared, server, app, ...specs]);
}
