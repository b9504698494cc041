import type { Activity, Problem, UnplannedBatch, UnplannedReason } from '../model';
import type { View } from './violation';

/** A batch may be left out only for a reason that, where it can be seen from the problem alone, is true. */
export function checkUnplanned({ problem, plan, say }: View): void {
  const seen = new Set<string>();
  for (const { batchId, reason } of plan.unplanned) {
    if (seen.has(batchId)) say('UNPLANNED', batchId, 'is named twice');
    seen.add(batchId);
    if (!isTrue(problem, { batchId, reason })) {
      say('UNPLANNED', batchId, `is left out for a reason that is not true: ${reason.code}`);
    }
  }
}

function isTrue(problem: Problem, { batchId, reason }: UnplannedBatch): boolean {
  const batch = problem.batches.find((candidate) => candidate.id === batchId);
  if (!batch) return false;
  if (reason.code === 'ROUTE') return batch.brokenStep === reason.step;
  return problem.activities.some(
    (activity) =>
      activity.batchId === batchId &&
      activity.step === reason.step &&
      activity.state.kind !== 'DONE' &&
      holds(problem, activity, reason),
  );
}

function holds(
  problem: Problem,
  activity: Activity,
  reason: Exclude<UnplannedReason, { code: 'ROUTE' }>,
): boolean {
  const { skill, clamps } = activity;
  const able = problem.people.filter((person) => skill === null || person.skills.includes(skill));
  switch (reason.code) {
    case 'SKILL':
      return able.length === reason.have && able.length < activity.people;
    case 'STATION':
      return problem.stations.some(
        ({ station, capacity }) =>
          station === reason.station &&
          activity.takes.some((take) => take.resource === station && take.units > capacity),
      );
    case 'CLAMPS': {
      const longEnough = problem.clamps.filter(({ length }) => clamps && length >= clamps.length);
      const owned = longEnough.reduce((sum, { count }) => sum + count, 0);
      return clamps !== null && owned < clamps.count;
    }
    case 'HOURS':
      // With more people than one it depends on who goes with whom; with one it is plain to see.
      if (activity.people !== 1 || activity.state.kind !== 'FREE') return true;
      return !able.some(({ calendar }) => hasTime(calendar, problem.now, activity));
    case 'HELD':
    case 'HORIZON':
      // That nothing was found cannot be seen from the problem alone.
      return true;
  }
}

function hasTime(
  { starts, ends }: { readonly starts: readonly number[]; readonly ends: readonly number[] },
  now: number,
  { minutes, pausable }: Activity,
): boolean {
  const spans = starts.map((start, i) => Math.max(0, (ends[i] ?? 0) - Math.max(now, start)));
  const most = pausable
    ? spans.reduce((a, b) => a + b, 0)
    : spans.reduce((a, b) => Math.max(a, b), 0);
  return most >= minutes * 60_000;
}
