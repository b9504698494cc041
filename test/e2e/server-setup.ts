import { freshDatabase } from '../database';
import { startServer } from '../server';

/**
 * One server with the demo shop on a database of its own for all browser tests; its address stands in TEST_SERVER_URL, the
 * superuser's address of its database in TEST_SERVER_DATABASE_URL.
 */
export async function setup(): Promise<() => Promise<void>> {
  const database = await freshDatabase();
  try {
    const server = await startServer(database.adminUrl);
    process.env['TEST_SERVER_URL'] = server.url;
    process.env['TEST_SERVER_DATABASE_URL'] = database.adminUrl;
    return async () => {
      await server.stop();
      await database.drop();
    };
  } catch (error) {
    await database.drop();
    throw error;
  }
}
