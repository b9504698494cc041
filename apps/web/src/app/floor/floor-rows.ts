import type { ApiBatch } from './floor-view';

/** The batches as the server last said them, by id. Those that have left the shop stay in it until the next snapshot. */
export type FloorRows = ReadonlyMap<string, ApiBatch>;

/**
 * Takes newer batches in. Changes, answers to commands and snapshots overtake each other on the way; the version tells
 * which is newer, and of two with the same version the later one has the newer forecast. The same map when nothing changed.
 */
export function mergeRows(known: FloorRows, changed: readonly ApiBatch[]): FloorRows {
  const newer = changed.filter((batch) => {
    const before = known.get(batch.id);
    return !before || batch.version >= before.version;
  });
  if (newer.length === 0) return known;
  const rows = new Map(known);
  for (const batch of newer) rows.set(batch.id, batch);
  return rows;
}

/** A snapshot replaces all, except where a change that came meanwhile is newer. Equal rows keep their object. */
export function snapshotRows(known: FloorRows, snapshot: readonly ApiBatch[]): FloorRows {
  return new Map(
    snapshot.map((batch) => {
      const before = known.get(batch.id);
      const isNewer = before !== undefined && before.version > batch.version;
      return [batch.id, isNewer ? before : batch];
    }),
  );
}

/** The last instant that anything on the batch is dated, in milliseconds; 0 when nothing has happened yet. */
export function latestFact(batch: {
  readonly runs: readonly {
    readonly startedAt: number | null;
    readonly finishedAt: number | null;
    readonly cutAt: number | null;
  }[];
  readonly releasedAt: number | null;
}): number {
  let latest = batch.releasedAt ?? 0;
  for (const run of batch.runs) {
    latest = Math.max(latest, run.startedAt ?? 0, run.finishedAt ?? 0, run.cutAt ?? 0);
  }
  return latest;
}
