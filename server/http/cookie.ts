import type { Response } from 'express';
import type { Settings } from '#server/settings/settings';

/** The cookie lives as long as a session may; what counts is the session's own end in the database. */
const MAX_AGE_MS = 30 * 24 * 3_600_000;

function isSecure(settings: Settings): boolean {
  return settings.publicUrl.startsWith('https:');
}

function nameOf(settings: Settings): string {
  // The prefix binds a cookie to this very host; browsers take it over TLS only.
  return isSecure(settings) ? '__Host-clamptide' : 'clamptide';
}

/** The session token in a Cookie header. */
export function readSessionCookie(header: string | undefined, settings: Settings): string | null {
  const name = nameOf(settings);
  for (const part of (header ?? '').split(';')) {
    const [key, value] = part.trim().split('=');
    if (key === name && value && /^[\w-]{20,100}$/.test(value)) return value;
  }
  return null;
}

/** Sets the session cookie, or clears it. */
export function writeSessionCookie(
  response: Response,
  settings: Settings,
  token: string | null,
): void {
  const options = {
    httpOnly: true,
    secure: isSecure(settings),
    sameSite: 'lax' as const,
    path: '/',
  };
  if (token === null) response.clearCookie(nameOf(settings), options);
  else response.cookie(nameOf(settings), token, { ...options, maxAge: MAX_AGE_MS });
}
