import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { gzipSync } from 'node:zlib';
import { chromium } from 'playwright-core';
import { DEMO_OWNER, DEMO_PASSWORD } from '../../server/demo/cast';
import { freshDatabase } from '../database';
import { chromiumPath, repository, startServer } from '../server';
import { TEST_BUILD } from '../test-settings.mjs';
import { startThrowAway } from '../throw-away.mjs';
import { signIn } from './api';

/* How much script, compressed by gzip, a browser fetches until a page stands: by what it really asks for. */

const cluster = await startThrowAway();
process.env['TEST_ADMIN_DATABASE_URL'] = cluster.url;
const database = await freshDatabase();
const server = await startServer(database.adminUrl);
const browser = await chromium.launch({
  executablePath: chromiumPath(),
  args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-sync'],
});
try {
  const { cookie } = await signIn(server.url, DEMO_OWNER.email, DEMO_PASSWORD);
  const [name = '', value = ''] = cookie.split('=');
  for (const [page, wanted, signedIn] of [
    ['/sign-in', 'form', false],
    ['/floor', '[data-part=card]', true],
  ] as const) {
    const context = await browser.newContext();
    if (signedIn) await context.addCookies([{ name, value, url: server.url }]);
    const tab = await context.newPage();
    const scripts = new Set<string>();
    tab.on('request', (request) => {
      if (request.resourceType() === 'script' || request.url().endsWith('.js')) {
        scripts.add(new URL(request.url()).pathname);
      }
    });
    const start = performance.now();
    await tab.goto(server.url + page);
    await tab.locator(wanted).first().waitFor({ timeout: 20_000 });
    const shown = performance.now() - start;
    let bytes = 0;
    for (const script of scripts) {
      const file = path.join(repository, 'dist', `${TEST_BUILD}web`, script);
      bytes += gzipSync(await readFile(file)).length;
    }
    console.log(
      `${page}: ${(bytes / 1000).toFixed(0)} kB of script (gzip) in ${scripts.size} files; first content after ${shown.toFixed(0)} ms`,
    );
    await context.close();
  }
} finally {
  await browser.close();
  await server.stop();
  await database.drop();
  await cluster.end();
}
