import { buildWhenStale } from '../../server/launch/build.mjs';
import { TEST_BUILD } from '../test-settings.mjs';
import { angularSpecs } from './angular-specs.mjs';
import { generated } from './generated.mjs';
import { lock } from './lock.mjs';
import { runVitest } from './run-vitest.mjs';
import { format, lint, types } from './static.mjs';

async function build() {
  const built = await buildWhenStale(TEST_BUILD);
  const reused = Object.entries(built).flatMap(([part, fresh]) => (fresh ? [] : [part]));
  return {
    passed: 1,
    failed: 0,
    note: reused.length > 0 ? `${reused.join(' and ')} unchanged since the last build` : '',
  };
}

async function unit() {
  const plain = await runVitest('unit', { cap: 1200 });
  const app = await angularSpecs();
  if (app === null) return plain;
  return {
    passed: plain.passed + app.passed,
    failed: plain.failed + app.failed,
    output: [plain, app].flatMap((one) => (one.failed > 0 ? [one.output] : [])).join('\n'),
  };
}

/**
 * Every gate in the order in which they run: the quick and telling ones first. `run` answers
 * `{ passed, failed, output, note }`; `needs` names what has to be there before.
 */
export const gates = [
  { name: 'format', run: format },
  { name: 'lint', run: lint },
  { name: 'types', run: types },
  { name: 'generated', run: generated },
  { name: 'lock', run: lock },
  { name: 'build', run: build },
  { name: 'unit', run: unit },
  { name: 'api', run: () => runVitest('api', { cap: 1800 }), needs: ['database'] },
  { name: 'outside', run: () => runVitest('outside', { cap: 1200 }) },
  { name: 'tidy', run: () => runVitest('tidy', { cap: 300 }) },
  { name: 'migrations', run: () => runVitest('migrations', { cap: 600 }), needs: ['database'] },
  {
    name: 'browser',
    run: () => runVitest('browser', { cap: 2400 }),
    needs: ['database', 'chromium'],
  },
];
