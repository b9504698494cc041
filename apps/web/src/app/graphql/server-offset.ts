/** How far a jump back must go before it is believed, in milliseconds: answers travel late, clocks rarely turn back. */
const SET_BACK = 5_000;

/**
 * The offset that turns a reading of a monotonic clock into the server's time, in milliseconds.
 * An answer always arrives later than it was stamped, so of several estimates the greatest is the closest; a much smaller
 * one means that the server's clock itself was set back.
 */
export function betterOffset(known: number | null, serverTime: number, monotonic: number): number {
  const seen = serverTime - monotonic;
  if (known === null || seen > known || known - seen > SET_BACK) return seen;
  return known;
}
