import { whyNotListen } from './free-port.mjs';
import { Stop } from './stop.mjs';

/** What a production server cannot guess; the server itself checks it again, with everything else. */
export const REQUIRED_IN_PRODUCTION = [
  'DATABASE_URL',
  'PUBLIC_URL',
  'CLAMPTIDE_SECRET',
  'SMTP_URL',
];

/** Finds before the long steps what would end them: missing production settings, a port that is taken. */
export async function checkSettings(env) {
  const missing = REQUIRED_IN_PRODUCTION.filter((name) => !env[name]);
  if (env.NODE_ENV === 'production' && missing.length > 0) {
    throw new Stop(
      `With NODE_ENV=production these settings are needed and missing: ${missing.join(', ')}.`,
    );
  }
  const port = Number(env.PORT || 4000);
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new Stop('PORT must be a whole number from 1 to 65535.');
  }
  await checkPort(port, env.HOST || '127.0.0.1');
}

async function checkPort(port, host) {
  const reason = await whyNotListen(port, host);
  if (reason === null) return;
  if (reason === 'EADDRINUSE') {
    throw new Stop(
      `Port ${port} is in use by another program: stop that one, or start with another port, such as "PORT=${port === 4000 ? 4001 : port + 1} npm start".`,
    );
  }
  if (reason === 'EACCES') {
    throw new Stop(`This user may not listen on port ${port}: start with "PORT=4000 npm start".`);
  }
  throw new Stop(
    `Listening on HOST=${host} is not possible (${reason}): leave HOST unset for this machine alone, or name an address of this machine.`,
  );
}
