import { startThrowAway } from './throw-away.mjs';

/**
 * Gives the tests a PostgreSQL of their own: the one that `npm test` started, else one started here.
 * Its superuser's address stands in TEST_ADMIN_DATABASE_URL.
 */
export async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env['TEST_ADMIN_DATABASE_URL']) return undefined;
  const cluster = await startThrowAway();
  process.env['TEST_ADMIN_DATABASE_URL'] = cluster.url;
  return async () => {
    delete process.env['TEST_ADMIN_DATABASE_URL'];
    await cluster.end();
  };
}
