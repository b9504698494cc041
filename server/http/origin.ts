import type { IncomingMessage } from 'node:http';
import type { Settings } from '#server/settings/settings';

/**
 * Whether a request that may carry a session comes from our own pages. Browsers say where a request comes from; programs
 * without a browser say nothing and carry no cookie they did not mean to send.
 */
export function isOwnOrigin(
  request: Pick<IncomingMessage, 'headers'>,
  settings: Pick<Settings, 'publicUrl'>,
): boolean {
  if (request.headers['sec-fetch-site'] === 'cross-site') return false;
  const { origin } = request.headers;
  if (origin === undefined) return true;
  if (!URL.canParse(origin)) return false;
  const { host } = new URL(origin);
  return host === new URL(settings.publicUrl).host || host === request.headers.host;
}
