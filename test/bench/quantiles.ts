/** The value below which a share of the values lies (nearest rank); NaN of none. */
export function quantile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.max(0, Math.ceil(share * sorted.length) - 1)] ?? Number.NaN;
}

/** "median 12 ms, 95th percentile 40 ms, largest 51 ms (n = 500)". */
export function spread(values: readonly number[]): string {
  const at = (share: number) => `${quantile(values, share).toFixed(0)} ms`;
  return `median ${at(0.5)}, 95th percentile ${at(0.95)}, largest ${at(1)} (n = ${values.length})`;
}
