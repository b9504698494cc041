/** A key that no other call has: 128 random bits in hexadecimal. Works without TLS, too, where randomUUID is missing. */
export function freshKey(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
