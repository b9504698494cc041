/**
 * `npm start`: from a fresh checkout to a running server. It uses nothing but Node's own modules, because it runs
 * before the packages are there.
 */
import { buildWhenStale } from './build.mjs';
import { checkSettings } from './check-settings.mjs';
import { atEnd, launch, prepareData } from './launch.mjs';
import { installPackagesWhenStale } from './packages.mjs';
import { say } from './say.mjs';
import { serve } from './serve.mjs';

await launch(async (asked) => {
  await checkSettings(process.env);
  const started = Date.now();
  await installPackagesWhenStale();
  const env = await prepareData();
  // Tests start a build of their own, beside a server that runs meanwhile.
  const prefix = process.env.CLAMPTIDE_BUILD ?? '';
  await buildWhenStale(prefix);
  env.CLAMPTIDE_WEB = `dist/${prefix}web`;
  if (process.argv.includes('--demo-fresh')) env.CLAMPTIDE_DEMO_FRESH = '1';
  const server = serve(['--enable-source-maps', `dist/${prefix}server/main.mjs`], env);
  atEnd(server.stop);
  const url = await Promise.race([server.ready, asked]);
  if (url) {
    say(`Clamptide is ready after ${Math.round((Date.now() - started) / 1000)} s: ${url}`);
    say('Ctrl-C ends it.');
  }
  const problem = await Promise.race([asked, server.ended]);
  if (problem) throw problem;
});
