/** The time zone that this browser is set to; a guess at where the shop stands. */
export function browserZone(): string {
  return Intl.DateTimeFormat().resolvedOptions().timeZone;
}

/** The IANA time zones that this browser knows, its own among them, by name. */
export function zones(): readonly string[] {
  return [...new Set([...Intl.supportedValuesOf('timeZone'), browserZone(), 'UTC'])].sort();
}
