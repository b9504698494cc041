interface Page<T> {
  nodes: T[];
  pageInfo: { hasNextPage: boolean; endCursor: string | null };
}

/** The newest page before what was read of the past; where they do not meet, the past is read again from there. */
export function mergeHistory<T extends { seq: number }>(
  known: Page<T> | null,
  newest: Page<T>,
): Page<T> {
  const oldest = newest.nodes.at(-1);
  if (!known || !oldest) return newest;
  const past = known.nodes.filter((event) => event.seq < oldest.seq);
  const meet = known.nodes.some((event) => event.seq === oldest.seq);
  if (!meet || past.length === 0) return newest;
  return { nodes: [...newest.nodes, ...past], pageInfo: known.pageInfo };
}
