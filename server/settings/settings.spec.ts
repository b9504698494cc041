import { describe, expect, it } from 'vitest';
import { parseSecrets, parseSettings, REQUIRED_IN_PRODUCTION, SettingsError } from './settings';

const SECRET = `first:${'0a'.repeat(32)}`;
const OLD_SECRET = `old:${'ff'.repeat(32)}`;
const development = {
  ADMIN_DATABASE_URL: 'postgres://admin:pw@127.0.0.1:23456/clamptide',
  CLAMPTIDE_SECRET: SECRET,
};
const production = {
  NODE_ENV: 'production',
  DATABASE_URL: 'postgres://admin:pw@db.example.com/clamptide',
  PUBLIC_URL: 'https://shop.example.com/',
  CLAMPTIDE_SECRET: SECRET,
  SMTP_URL: 'smtps://user:pw@mail.example.com:465',
};

describe('settings', () => {
  it('have a default for everything that development can guess', () => {
    expect(parseSettings(development)).toMatchObject({
      port: 4000,
      host: '127.0.0.1',
      publicUrl: 'http://localhost:4000',
      adminDatabaseUrl: development.ADMIN_DATABASE_URL,
      smtpUrl: null,
      production: false,
      demo: true,
      demoFresh: false,
    });
  });

  it('take an empty variable for one that is not set', () => {
    expect(parseSettings({ ...development, PORT: '', SMTP_URL: '' }).port).toBe(4000);
  });

  it('derive the public address from the port and drop a slash at its end', () => {
    expect(parseSettings({ ...development, PORT: '4100' }).publicUrl).toBe('http://localhost:4100');
    expect(parseSettings(production).publicUrl).toBe('https://shop.example.com');
  });

  it.each([
    ['PORT', 'abc'],
    ['PORT', '0'],
    ['PORT', '65536'],
    ['PORT', '40.5'],
    ['PUBLIC_URL', 'shop.example.com'],
    ['PUBLIC_URL', 'ftp://shop.example.com'],
    ['DATABASE_URL', 'mysql://localhost/x'],
    ['SMTP_URL', 'https://mail.example.com'],
    ['CLAMPTIDE_DEMO', 'no'],
    ['CLAMPTIDE_SECRET', 'first:abc'],
  ])('refuse %s=%s in a sentence that names it', (name, value) => {
    expect(() => parseSettings({ ...development, [name]: value })).toThrow(SettingsError);
    expect(() => parseSettings({ ...development, [name]: value })).toThrow(name);
  });

  it('name every mistake at once', () => {
    expect(() => parseSettings({ ...development, PORT: 'x', SMTP_URL: 'y' })).toThrow(
      /PORT.*SMTP_URL/,
    );
  });

  it('refuse to start in production and name all that is missing', () => {
    try {
      parseSettings({ NODE_ENV: 'production' });
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(SettingsError);
      for (const name of REQUIRED_IN_PRODUCTION) expect(String(error)).toContain(name);
    }
  });

  it.each(REQUIRED_IN_PRODUCTION)('refuse production without %s', (name) => {
    expect(() => parseSettings({ ...production, [name]: undefined })).toThrow(name);
  });

  it('have no demo in production, whatever is asked', () => {
    const set = { ...production, CLAMPTIDE_DEMO: 'on', CLAMPTIDE_DEMO_FRESH: '1' };
    expect(parseSettings(set)).toMatchObject({ production: true, demo: false, demoFresh: false });
  });

  it('switch the demo off', () => {
    expect(parseSettings({ ...development, CLAMPTIDE_DEMO: 'off' }).demo).toBe(false);
  });
});

describe('secrets', () => {
  it('keep their order, so that the first encrypts', () => {
    const secrets = parseSecrets(`${SECRET}, ${OLD_SECRET}`);
    expect(secrets.map((secret) => secret.id)).toEqual(['first', 'old']);
    expect(secrets[0].key).toHaveLength(32);
  });

  it('refuse a key id that stands twice', () => {
    expect(() => parseSecrets(`${SECRET},${SECRET}`)).toThrow(/twice/);
  });

  it('never repeat a mistyped key in the message', () => {
    const mistyped = 'ab'.repeat(31);
    try {
      parseSecrets(`first:${mistyped}`);
      expect.unreachable();
    } catch (error) {
      expect(String(error)).not.toContain(mistyped);
    }
  });
});
