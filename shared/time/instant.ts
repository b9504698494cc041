/** Milliseconds since 1970-01-01T00:00Z. */
export type Instant = number;

export const MINUTE_MS = 60_000;
export const HOUR_MS = 60 * MINUTE_MS;
export const DAY_MS = 24 * HOUR_MS;

/** Reads an ISO 8601 instant with a zone; throws a RangeError when it is none. */
export function parseInstant(iso: string): Instant {
  const at = /(Z|[+-]\d\d:?\d\d)$/.test(iso) ? Date.parse(iso) : Number.NaN;
  if (Number.isNaN(at)) throw new RangeError(`Not an instant: ${iso}`);
  return at;
}

/** Writes an instant as ISO 8601 in UTC with milliseconds. */
export function formatInstant(at: Instant): string {
  return new Date(at).toISOString();
}
