/** Milliseconds since 1970-01-01T00:00Z. */
export type Instant = number;

export const MINUTE_MS = 60_000;
export const HOUR_MS = 60 * MINUTE_MS;
export const DAY_MS = 24 * HOUR_MS;

const ISO =
  /^(\d{4}-\d\d-\d\d)T([01]\d|2[0-3]):[0-5]\d(:[0-5]\d(\.\d{1,9})?)?(Z|[+-]\d\d:?[0-5]\d)$/;

/**
 * Reads an ISO 8601 instant: date, time to the minute or finer (beyond milliseconds cut off), Z or an offset. RangeError
 * when a text is none, without an offset, or on a date that does not exist (engines read 30 February as 2 March).
 */
export function parseInstant(iso: string): Instant {
  const date = ISO.exec(iso)?.[1];
  const midnight = date === undefined ? Number.NaN : Date.parse(`${date}T00:00:00Z`);
  if (Number.isNaN(midnight) || new Date(midnight).toISOString().slice(0, 10) !== date) {
    throw new RangeError(`Not an instant: ${iso}`);
  }
  const at = Date.parse(iso.replace(/([+-]\d\d)(\d\d)$/, '$1:$2'));
  if (Number.isNaN(at)) throw new RangeError(`Not an instant: ${iso}`);
  return at;
}

/** Writes an instant as ISO 8601 in UTC with milliseconds. RangeError for NaN and infinities. */
export function formatInstant(at: Instant): string {
  return new Date(at).toISOString();
}
