/**
 * `npm run dev`: the database as in `npm start`, the server restarted and the app rebuilt whenever their files change.
 * The app is served on port 4200 and passes what is the server's on to it.
 */
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { checkSettings } from './check-settings.mjs';
import { run } from './children.mjs';
import { launch, prepareData } from './launch.mjs';
import { installPackagesWhenStale } from './packages.mjs';
import { say } from './say.mjs';
import { Stop } from './stop.mjs';

const APP_PORT = 4200;

/** The proxy's settings with the server's port, which PORT may have moved. */
async function proxyFile(port) {
  const text = await readFile('apps/web/proxy.json', 'utf8');
  await mkdir('dist', { recursive: true });
  await writeFile('dist/proxy.json', text.replaceAll(/127\.0\.0\.1:\d+/g, `127.0.0.1:${port}`));
  return 'dist/proxy.json';
}

await launch(async (asked) => {
  if (process.env.NODE_ENV === 'production') {
    throw new Stop('"npm run dev" is for development: unset NODE_ENV, or use "npm start".');
  }
  await checkSettings(process.env);
  await installPackagesWhenStale();
  const data = await prepareData();
  const env = { ...process.env, PUBLIC_URL: `http://localhost:${APP_PORT}`, ...data };
  const proxy = await proxyFile(process.env.PORT || 4000);
  say(`The app comes up on http://localhost:${APP_PORT}; Ctrl-C ends everything.`);
  const server = [
    'node_modules/tsx/dist/cli.mjs',
    'watch',
    '--clear-screen=false',
    'server/main.ts',
  ];
  const app = ['node_modules/@angular/cli/bin/ng.js', 'serve', `--port=${APP_PORT}`];
  const ended = await Promise.race([
    asked,
    run(process.execPath, server, { env, show: true }),
    run(process.execPath, [...app, `--proxy-config=${proxy}`], {
      env: { ...env, NG_CLI_ANALYTICS: 'false' },
      show: true,
    }),
  ]);
  if (ended) throw new Stop(`One half ended (exit code ${ended.code}); its words stand above.`);
});
