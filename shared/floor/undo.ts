import { MINUTE_MS, type Instant } from '#shared/time/instant';
import { may } from '#shared/members/permissions';
import { applyChanges, invertChanges, sameRun } from './apply';
import type { FloorView } from './judge';
import type { Actor, FloorBatch, FloorChangeSet } from './model';
import { runOf } from './progress';
import { refuse, type Verdict } from './refusal';
import { clampPeak, stationPeak } from './resources';

/** How long a command can be undone. */
export const UNDO_MINUTES = 10;

/** A command as it was recorded. */
export interface RecordedCommand {
  by: string | null;
  recordedAt: Instant;
  changes: FloorChangeSet;
  /** Whether nothing has been recorded on the batch since. */
  isLatest: boolean;
}

/**
 * Whether a command may be taken back: by the one who did it or by a maker, within ten minutes, unless something has
 * been built on it: a later command on the batch, or somebody else's use of what it gave back.
 */
export function judgeUndo(
  view: FloorView,
  batch: FloorBatch,
  command: RecordedCommand,
  actor: Actor,
): Verdict {
  const own =
    command.by !== null && command.by === actor.memberId && may(actor.roles, 'moveBatches');
  if (!own && !may(actor.roles, 'undoOthers')) return refuse({ code: 'FORBIDDEN', what: 'UNDO' });
  if (view.now > command.recordedAt + UNDO_MINUTES * MINUTE_MS) {
    return refuse({ code: 'UNDO_TOO_LATE' });
  }
  const untouched = command.changes.runs.every((change) =>
    sameRun(runOf(batch, change.step, change.piece), change.after),
  );
  if (!command.isLatest || !untouched) return refuse({ code: 'UNDO_BUILT_ON' });
  const changes = invertChanges(command.changes);
  if (changes.taken.length > 0 && overfull(view, batch, changes)) {
    return refuse({ code: 'UNDO_BUILT_ON' });
  }
  return { ok: true, changes };
}

/** Whether the shop would hold more than it has, were the changes made. */
function overfull(view: FloorView, batch: FloorBatch, changes: FloorChangeSet): boolean {
  const after = applyChanges(batch, changes);
  const batches = view.batches.map((other) => (other.id === batch.id ? after : other));
  const from = Math.min(...changes.taken.map((occupation) => occupation.since));
  return changes.taken.some(({ resource, isClamps }) => {
    if (isClamps) {
      const clamp = view.shop.clamps.find((candidate) => candidate.key === resource);
      return clamp !== undefined && clampPeak(clamp, batches, from) > clamp.count;
    }
    const station = view.shop.stations.find((candidate) => candidate.key === resource);
    return station !== undefined && stationPeak(station, batches, from) > station.capacity;
  });
}
