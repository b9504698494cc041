import { tmpdir } from 'node:os';
import pg from 'pg';
import { pino } from 'pino';
import { startServer, type RunningServer } from '#server/server';
import { parseSecrets, type Settings } from '#server/settings/settings';
import { migratedDatabase, type TestDatabase } from '../database';
import { TEST_SECRET } from '../test-settings.mjs';
import { Caller } from './caller';

/** A server in this process on a database of its own. */
export interface ApiServer {
  /** Without a slash at the end. */
  url: string;
  settings: Settings;
  services: RunningServer['services'];
  /** The database's superuser: sets up what the API cannot, and looks behind the walls. */
  admin: pg.Pool;
  /** Someone who calls, from an address of their own, with nothing that says who they are. */
  stranger(): Caller;
  stop(): Promise<void>;
}

let addresses = 0;

/** What a test may bring along instead of a database of the server's own and the real clock. */
export interface Around {
  /** Whoever made it drops it. */
  database?: TestDatabase;
  now?: () => Date;
}

/** Starts what `npm start` starts, without the demo shop. What it logs as an error is thrown away: tests provoke errors. */
export async function startApiServer(
  more: Partial<Settings> = {},
  around: Around = {},
): Promise<ApiServer> {
  const database = around.database ?? (await migratedDatabase());
  const settings: Settings = {
    port: 0,
    host: '127.0.0.1',
    publicUrl: 'http://localhost:4000',
    dataFolder: tmpdir(),
    webFolder: tmpdir(),
    adminDatabaseUrl: database.adminUrl,
    smtpUrl: null,
    secrets: parseSecrets(TEST_SECRET),
    production: false,
    demo: false,
    demoFresh: false,
    ...more,
  };
  const log = pino({ level: 'silent' });
  const running = await startServer({ settings, log, now: around.now ?? (() => new Date()) });
  const admin = new pg.Pool({ connectionString: database.adminUrl, max: 3 });
  admin.on('error', () => undefined);
  const url = `http://127.0.0.1:${running.port}`;
  return {
    url,
    settings,
    services: running.services,
    admin,
    stranger: () => new Caller(url, `198.51.${(addresses >> 8) % 256}.${addresses++ % 256}`),
    stop: async () => {
      await running.stop();
      await admin.end();
      if (!around.database) await database.drop();
    },
  };
}
