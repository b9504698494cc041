import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Logger } from 'pino';
import { doorUrl } from '#server/db/connections';
import { openDoors } from '#server/db/doors';
import { setUpDatabase } from '#server/db/setup';
import { prepareDemo } from '#server/demo/prepare';
import { makeApollo } from '#server/http/apollo';
import { makeApp, type Lifecycle } from '#server/http/app';
import { makeSchema } from '#server/http/schema';
import type { Services } from '#server/http/services';
import { Hub } from '#server/live/hub';
import { serveSockets } from '#server/live/socket';
import { SettingsError, type Settings } from '#server/settings/settings';
import { startWork } from '#server/work/start';

export interface RunningServer {
  services: Services;
  /** The port it listens on; useful where 0 was asked for. */
  port: number;
  /** Lines for whoever started it, such as the demo's sign-ins. */
  notes: readonly string[];
  stop(): Promise<void>;
}

/** Sets the database up, then serves until it is stopped. */
export async function startServer(given: {
  settings: Settings;
  log: Logger;
  now: () => Date;
}): Promise<RunningServer> {
  const { settings, log, now } = given;
  await setUpDatabase(settings.adminDatabaseUrl, settings.secrets);
  const doors = openDoors(settings.adminDatabaseUrl, settings.secrets, (error) =>
    log.warn({ error }, 'a database connection broke'),
  );
  const hub = new Hub(
    doors,
    log,
    now,
    doorUrl(settings.adminDatabaseUrl, 'relay', settings.secrets),
  );
  const services: Services = { settings, doors, hub, log, now };
  const lifecycle: Lifecycle = { draining: false };
  const httpServer = createServer();
  const schema = makeSchema();
  const apollo = makeApollo(schema, httpServer, log);
  await apollo.start();
  httpServer.on('request', makeApp(services, apollo, lifecycle));
  const sockets = serveSockets(httpServer, schema, services);
  const notes = settings.demo ? await prepareDemo(services) : [];
  const work = await startWork(services);
  await listen(httpServer, settings);
  return {
    services,
    port: (httpServer.address() as AddressInfo).port,
    notes,
    stop: async () => {
      lifecycle.draining = true;
      await sockets.close();
      await apollo.stop();
      httpServer.closeAllConnections();
      await work.stop();
      await hub.close();
      await doors.close();
    },
  };
}

function listen(server: Server, { port, host }: Settings): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      reject(
        error.code === 'EADDRINUSE'
          ? new SettingsError(
              `Port ${port} is in use. Stop what uses it, or choose another: PORT=${port + 1} npm start.`,
            )
          : error,
      );
    });
    server.listen(port, host, () => resolve());
  });
}
