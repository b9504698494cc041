import { existsSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { buildWhenStale } from '../server/launch/build.mjs';
import { freePort } from '../server/launch/free-port.mjs';
import { root } from '../server/launch/root.mjs';
import { serve } from '../server/launch/serve.mjs';
import { TEST_BUILD, TEST_SECRET } from './test-settings.mjs';

/** A server process of its own, as `npm start` would run it. */
export interface TestServer {
  /** Without a slash at the end. */
  url: string;
  port: number;
  /** The process, for measuring it. */
  pid: number;
  /** Ends it as a person would, with a signal, and waits until it is gone. */
  stop(): Promise<void>;
}

/**
 * Starts the built server on a free port against a database. Several may share one: they know each other's secrets.
 * `env` is added to, or overrides, what the launcher would set.
 */
export async function startServer(
  adminUrl: string,
  env: Record<string, string> = {},
): Promise<TestServer> {
  await needBuild();
  const port = await freePort();
  const data = await mkdtemp(path.join(tmpdir(), 'clamptide-data-'));
  const server = serve(['--enable-source-maps', `dist/${TEST_BUILD}server/main.mjs`], {
    NODE_ENV: 'development',
    PORT: `${port}`,
    HOST: '127.0.0.1',
    PUBLIC_URL: `http://localhost:${port}`,
    CLAMPTIDE_DATA: data,
    CLAMPTIDE_WEB: `dist/${TEST_BUILD}web`,
    CLAMPTIDE_SECRET: TEST_SECRET,
    ADMIN_DATABASE_URL: adminUrl,
    ...env,
  });
  const stop = async () => {
    await server.stop();
    await rm(data, { recursive: true, force: true });
  };
  try {
    await server.ready;
  } catch (error) {
    await stop();
    throw error;
  }
  return { url: `http://localhost:${port}`, port, pid: server.pid ?? 0, stop };
}

/** A run of `npm test` has built already, and says how that went: building again for each test would only take time. */
async function needBuild(): Promise<void> {
  const built = process.env['TEST_BUILT'];
  if (built === 'failed') throw new Error('The build failed, so there is no server to start.');
  if (built !== 'yes') await buildWhenStale(TEST_BUILD);
}

/** Debian's Chromium, or the browser that TEST_CHROMIUM names. */
export function chromiumPath(): string {
  const found = process.env['TEST_CHROMIUM'] ?? '/usr/bin/chromium';
  if (existsSync(found)) return found;
  throw new Error(`no browser at ${found}: "npm test -- browser" installs one`);
}

/** The repository's root, for files that a test reads. */
export const repository: string = root;
