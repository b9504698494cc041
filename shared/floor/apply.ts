import type { FloorBatch, FloorChangeSet, Occupation, StepRun } from './model';

/** The batch after a change set: a new value; the version is left to whoever stores it. */
export function applyChanges(batch: FloorBatch, changes: FloorChangeSet): FloorBatch {
  const runs = new Map(batch.runs.map((run) => [runKey(run), run]));
  for (const change of changes.runs) {
    if (change.after) runs.set(runKey(change), change.after);
    else runs.delete(runKey(change));
  }
  const occupations = new Map(batch.occupations.map((o) => [occupationKey(o), o]));
  for (const { occupation, at } of changes.released) {
    occupations.set(occupationKey(occupation), { ...occupation, until: at });
  }
  for (const taken of changes.taken) occupations.set(occupationKey(taken), taken);
  const { releasedAt, shippedAt, assignedTo } = changes.fields;
  return {
    ...batch,
    runs: [...runs.values()],
    occupations: [...occupations.values()],
    releasedAt: releasedAt ? releasedAt.after : batch.releasedAt,
    shippedAt: shippedAt ? shippedAt.after : batch.shippedAt,
    assignedTo: assignedTo ? assignedTo.after : batch.assignedTo,
  };
}

/**
 * The change set that takes another back. What was taken is given back at the instant it was taken, so that it counts
 * for no time at all; what was given back is taken again as it stood. Overrides stay written down: they are for ever.
 */
export function invertChanges(changes: FloorChangeSet): FloorChangeSet {
  const { releasedAt, shippedAt, assignedTo } = changes.fields;
  return {
    runs: changes.runs.map(({ step, piece, before, after }) => ({
      step,
      piece,
      before: after,
      after: before,
    })),
    taken: changes.released.map(({ occupation }) => ({ ...occupation, until: null })),
    released: changes.taken.map((occupation) => ({ occupation, at: occupation.since })),
    fields: {
      ...(releasedAt && { releasedAt: { before: releasedAt.after, after: releasedAt.before } }),
      ...(shippedAt && { shippedAt: { before: shippedAt.after, after: shippedAt.before } }),
      ...(assignedTo && { assignedTo: { before: assignedTo.after, after: assignedTo.before } }),
    },
    cut: [],
  };
}

/** Whether two runs say the same. */
export function sameRun(a: StepRun | null, b: StepRun | null): boolean {
  if (a === null || b === null) return a === b;
  return (
    a.step === b.step &&
    a.piece === b.piece &&
    a.startedAt === b.startedAt &&
    a.startedBy === b.startedBy &&
    a.finishedAt === b.finishedAt &&
    a.finishedBy === b.finishedBy &&
    a.cutAt === b.cutAt &&
    a.cutBy === b.cutBy
  );
}

/** What makes an occupation the same one: the batch is given, the rest is here. */
export function occupationKey(o: Occupation): string {
  return `${o.resource}/${o.step}/${o.piece}/${o.since}`;
}

function runKey(of: { step: string; piece: number }): string {
  return `${of.step}/${of.piece}`;
}
