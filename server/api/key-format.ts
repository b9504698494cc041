import { randomInt } from 'node:crypto';
import { crc32 } from 'node:zlib';

const ALPHABET = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz';
const PREFIX = 'ctide_';
const RANDOM_LENGTH = 32;
const CHECK_LENGTH = 6;

/**
 * A new API key: a prefix that says whose it is, 32 random base62 characters (190 bits), and a checksum of six, so that
 * a mistyped key is told without asking the database.
 */
export function newApiKey(): string {
  const random = Array.from({ length: RANDOM_LENGTH }, () => ALPHABET[randomInt(62)]).join('');
  return PREFIX + random + checksum(random);
}

/** Whether a text has the form of an API key and its checksum is right. */
export function isWellFormedKey(text: string): boolean {
  if (!text.startsWith(PREFIX)) return false;
  const body = text.slice(PREFIX.length);
  if (!/^[0-9A-Za-z]+$/.test(body) || body.length !== RANDOM_LENGTH + CHECK_LENGTH) return false;
  return checksum(body.slice(0, RANDOM_LENGTH)) === body.slice(RANDOM_LENGTH);
}

/** What people recognise a key by: its first characters. */
export function shownPrefix(key: string): string {
  return key.slice(0, PREFIX.length + 4);
}

function checksum(random: string): string {
  let value = crc32(random);
  let text = '';
  for (let i = 0; i < CHECK_LENGTH; i++) {
    text = (ALPHABET[value % 62] ?? '') + text;
    value = Math.floor(value / 62);
  }
  return text;
}
