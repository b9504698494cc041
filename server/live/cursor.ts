/** A place in a shop's stream, as the API hands it out. */
export function toCursor(seq: number): string {
  return Buffer.from(`v1:${seq}`).toString('base64url');
}

/** The number in a cursor; null when the text is not one. */
export function fromCursor(cursor: string): number | null {
  const match = /^v1:(\d{1,10})$/.exec(Buffer.from(cursor, 'base64url').toString());
  return match ? Number(match[1]) : null;
}
