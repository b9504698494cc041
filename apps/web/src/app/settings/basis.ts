/**
 * What a form goes on from when a newer shop arrives while somebody may be typing into it. Where its own part did not
 * change, only the version moves on, so that saving another form does not make this one old. Where it did change, the
 * form stays as it is: saving it is then refused, and the person decides.
 */
export function nextBasis<T extends { readonly version: number }>(
  before: T | undefined,
  newer: T,
  part: (shop: T) => unknown,
): T {
  if (!before) return newer;
  const same = JSON.stringify(part(before)) === JSON.stringify(part(newer));
  return same ? { ...before, version: newer.version } : before;
}
