import { createHash, randomBytes } from 'node:crypto';

/** A new opaque token of 256 random bits. */
export function newToken(): string {
  return randomBytes(32).toString('base64url');
}

/** What the database keeps of a token. Tokens have too much entropy to be guessed, so a plain hash is right. */
export function hashOf(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
