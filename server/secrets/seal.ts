import { createCipheriv, createDecipheriv, randomBytes } from 'node:crypto';
import type { Secret } from '#server/settings/settings';

/** Encrypts with the first key of the settings: `<key id>.<nonce>.<ciphertext and tag>`, AES-256-GCM. */
export function seal(plain: Buffer, secrets: readonly [Secret, ...Secret[]]): string {
  const [{ id, key }] = secrets;
  const nonce = randomBytes(12);
  const cipher = createCipheriv('aes-256-gcm', key, nonce);
  cipher.setAAD(Buffer.from(id));
  const body = Buffer.concat([cipher.update(plain), cipher.final(), cipher.getAuthTag()]);
  return `${id}.${nonce.toString('base64url')}.${body.toString('base64url')}`;
}

/** Decrypts with whichever key sealed it; null when that key is not among the settings' keys or the text was changed. */
export function unseal(sealed: string, secrets: readonly Secret[]): Buffer | null {
  const [id = '', nonce = '', body = ''] = sealed.split('.');
  const secret = secrets.find((candidate) => candidate.id === id);
  if (!secret) return null;
  const bytes = Buffer.from(body, 'base64url');
  if (bytes.length < 16) return null;
  try {
    const decipher = createDecipheriv('aes-256-gcm', secret.key, Buffer.from(nonce, 'base64url'));
    decipher.setAAD(Buffer.from(id));
    decipher.setAuthTag(bytes.subarray(bytes.length - 16));
    return Buffer.concat([decipher.update(bytes.subarray(0, -16)), decipher.final()]);
  } catch {
    // A wrong tag: the text is not what was sealed.
    return null;
  }
}
