import type { Logger } from 'pino';
import type { Doors } from '#server/db/doors';
import type { Hub } from '#server/live/hub';
import type { Settings } from '#server/settings/settings';

/** What every capability works with; made once in server/main.ts. */
export interface Services {
  settings: Settings;
  doors: Doors;
  hub: Hub;
  log: Logger;
  /** The server's clock; tests bring their own. */
  now(): Date;
}
