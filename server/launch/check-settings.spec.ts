import { createServer } from 'node:net';
import { describe, expect, it } from 'vitest';
import { REQUIRED_IN_PRODUCTION } from '#server/settings/settings';
import { checkSettings, REQUIRED_IN_PRODUCTION as launcherRequires } from './check-settings.mjs';
import { freePort } from './free-port.mjs';

const full = Object.fromEntries(REQUIRED_IN_PRODUCTION.map((name) => [name, 'given']));

describe('settings before the long steps', () => {
  it('ask in production for what the server asks for', () => {
    expect(launcherRequires).toEqual(REQUIRED_IN_PRODUCTION);
  });

  it('name all that production misses in one sentence', async () => {
    const promise = checkSettings({
      NODE_ENV: 'production',
      PUBLIC_URL: 'https://shop.example.com',
    });
    await expect(promise).rejects.toThrow(/missing: DATABASE_URL, CLAMPTIDE_SECRET, SMTP_URL\./);
  });

  it('pass when all is well', async () => {
    await checkSettings({ ...full, NODE_ENV: 'production', PORT: `${await freePort()}` });
  });

  it.each(['0', '70000', 'http', '80.5'])('refuse the port %s', async (PORT) => {
    await expect(checkSettings({ PORT })).rejects.toThrow(/PORT/);
  });

  it('say which port is taken and how to take another', async () => {
    const port = await freePort();
    const server = createServer().listen(port, '127.0.0.1');
    await new Promise((resolve) => server.once('listening', resolve));
    try {
      await expect(checkSettings({ PORT: `${port}` })).rejects.toThrow(
        new RegExp(`Port ${port} is in use.*PORT=${port + 1} npm start`),
      );
    } finally {
      server.close();
    }
  });

  it('refuse an address that is not of this machine', async () => {
    const PORT = `${await freePort()}`;
    await expect(checkSettings({ PORT, HOST: '192.0.2.1' })).rejects.toThrow(/HOST=192\.0\.2\.1/);
  });
});
