import { createHmac } from 'node:crypto';
import pg from 'pg';
import type { Secret } from '#server/settings/settings';

/** The four doors of the database, each its own role. */
export const DOORS = ['shop', 'entry', 'relay', 'work'] as const;
export type Door = (typeof DOORS)[number];

export function roleOf(door: Door): string {
  return `clamptide_${door}`;
}

/** A door's password: made from the settings' key, so that it is stored nowhere. */
export function passwordOf(door: Door, secrets: readonly [Secret, ...Secret[]]): string {
  return createHmac('sha256', secrets[0].key).update(`database role ${door}`).digest('base64url');
}

/** The address of the same database through a door. */
export function doorUrl(
  adminUrl: string,
  door: Door,
  secrets: readonly [Secret, ...Secret[]],
): string {
  const url = new URL(adminUrl);
  url.username = roleOf(door);
  url.password = passwordOf(door, secrets);
  return url.href;
}

/** A pool whose broken connections end the query that used them, never the process. */
export function openPool(url: string, max: number, onError: (error: Error) => void): pg.Pool {
  const pool = new pg.Pool({ connectionString: url, max, connectionTimeoutMillis: 10_000 });
  pool.on('error', onError);
  pool.on('connect', (client) => client.on('error', onError));
  return pool;
}
