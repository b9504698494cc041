import path from 'node:path';
import * as z from 'zod';

/** A key for what is stored encrypted. The first of several encrypts, all decrypt: that is how keys are changed. */
export interface Secret {
  /** Stored beside what was encrypted with it. */
  id: string;
  /** 32 bytes. */
  key: Buffer;
}

/** Everything that can be set from outside, parsed once at the start. */
export interface Settings {
  port: number;
  /** The address to listen on; loopback unless set. */
  host: string;
  /** Where people reach the server, without a slash at the end. */
  publicUrl: string;
  /** The folder for files that this process keeps. */
  dataFolder: string;
  /** The built web app. */
  webFolder: string;
  /** A connection that may create roles and the schema; used at the start only. */
  adminDatabaseUrl: string;
  /** Where mail goes; null in development, where it is caught. */
  smtpUrl: string | null;
  secrets: readonly [Secret, ...Secret[]];
  production: boolean;
  /** Whether the demo shop is made. */
  demo: boolean;
  /** Whether the demo shop is replaced at this start. */
  demoFresh: boolean;
}

/** A mistake in the settings, in one sentence for whoever set them. */
export class SettingsError extends Error {}

/** What a production server cannot guess. Development makes each of these itself. */
export const REQUIRED_IN_PRODUCTION = [
  'DATABASE_URL',
  'PUBLIC_URL',
  'CLAMPTIDE_SECRET',
  'SMTP_URL',
] as const;

const SECRET = /^([a-z0-9-]{1,32}):([0-9a-f]{64})$/i;

/** Reads `<key id>:<64 hex digits>`, several separated by commas. */
export function parseSecrets(text: string): [Secret, ...Secret[]] {
  const secrets = text.split(',').map((part): Secret => {
    const match = SECRET.exec(part.trim());
    if (!match?.[1] || !match[2]) {
      // Never repeat the value: it may be a real key with a typing mistake.
      throw new SettingsError(
        'CLAMPTIDE_SECRET must be <key id>:<64 hex digits>, several separated by commas.',
      );
    }
    return { id: match[1], key: Buffer.from(match[2], 'hex') };
  });
  const [first, ...others] = secrets;
  if (!first) throw new SettingsError('CLAMPTIDE_SECRET is empty.');
  if (new Set(secrets.map((secret) => secret.id)).size < secrets.length) {
    throw new SettingsError('CLAMPTIDE_SECRET names the same key id twice.');
  }
  return [first, ...others];
}

const url = (...protocols: string[]) =>
  z.string().refine((text) => URL.canParse(text) && protocols.includes(new URL(text).protocol), {
    error: `must be an address that begins with ${protocols.map((one) => `${one}//`).join(' or ')}`,
  });

const environment = z.object({
  PORT: z.coerce
    .number({ error: 'must be a port number' })
    .int({ error: 'must be a whole number' })
    .min(1, { error: 'must be from 1 to 65535' })
    .max(65_535, { error: 'must be from 1 to 65535' })
    .default(4000),
  HOST: z.string().min(1).default('127.0.0.1'),
  PUBLIC_URL: url('http:', 'https:').optional(),
  CLAMPTIDE_DATA: z.string().min(1).default('.data'),
  CLAMPTIDE_WEB: z.string().min(1).default('dist/web'),
  DATABASE_URL: url('postgres:', 'postgresql:').optional(),
  ADMIN_DATABASE_URL: url('postgres:', 'postgresql:').optional(),
  SMTP_URL: url('smtp:', 'smtps:').optional(),
  CLAMPTIDE_SECRET: z.string().optional(),
  CLAMPTIDE_DEMO: z.enum(['on', 'off'], { error: 'must be "on" or "off"' }).default('on'),
  CLAMPTIDE_DEMO_FRESH: z.string().optional(),
  NODE_ENV: z.string().optional(),
});

/** Parses the environment; throws a SettingsError whose message names every mistake. */
export function parseSettings(env: Readonly<Record<string, string | undefined>>): Settings {
  const given = Object.fromEntries(
    Object.entries(env).filter(([, value]) => value !== undefined && value !== ''),
  );
  const parsed = environment.safeParse(given);
  if (!parsed.success) {
    const mistakes = parsed.error.issues.map(
      (issue) => `${String(issue.path[0])} ${issue.message}`,
    );
    throw new SettingsError(`The settings are wrong: ${mistakes.join('; ')}.`);
  }
  const set = parsed.data;
  const production = set.NODE_ENV === 'production';
  const needed = production ? REQUIRED_IN_PRODUCTION : (['CLAMPTIDE_SECRET'] as const);
  const missing: string[] = needed.filter((name) => set[name] === undefined);
  const adminDatabaseUrl = set.ADMIN_DATABASE_URL ?? set.DATABASE_URL;
  if (adminDatabaseUrl === undefined && !production) missing.push('DATABASE_URL');
  if (missing.length > 0 || adminDatabaseUrl === undefined) {
    throw new SettingsError(
      `${production ? 'With NODE_ENV=production' : 'Without "npm start"'} these settings are needed and missing: ${missing.join(', ')}.`,
    );
  }
  return {
    port: set.PORT,
    host: set.HOST,
    publicUrl: (set.PUBLIC_URL ?? `http://localhost:${set.PORT}`).replace(/\/+$/, ''),
    dataFolder: path.resolve(set.CLAMPTIDE_DATA),
    webFolder: path.resolve(set.CLAMPTIDE_WEB),
    adminDatabaseUrl,
    smtpUrl: set.SMTP_URL ?? null,
    secrets: parseSecrets(set.CLAMPTIDE_SECRET ?? ''),
    production,
    demo: !production && set.CLAMPTIDE_DEMO === 'on',
    demoFresh: !production && set.CLAMPTIDE_DEMO === 'on' && set.CLAMPTIDE_DEMO_FRESH === '1',
  };
}
