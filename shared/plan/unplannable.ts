import type { Activity, PlanBatch, Problem, UnplannedReason } from './model';
import { workFrom, type Teams } from './teams';

/** Why batches cannot be planned in this shop whatever else is going on; the first reason of each. */
export function unplannable(problem: Problem, teams: Teams): Map<string, UnplannedReason> {
  const reasons = new Map<string, UnplannedReason>();
  const known = new Map<string, UnplannedReason | null>();
  for (const batch of problem.batches) {
    const reason = routeReason(batch);
    if (reason) reasons.set(batch.id, reason);
  }
  for (const activity of problem.activities) {
    if (activity.state.kind !== 'FREE' || reasons.has(activity.batchId)) continue;
    const reason =
      peopleReason(problem, teams, activity, known) ??
      stationReason(problem, activity) ??
      clampReason(problem, activity);
    if (reason) reasons.set(activity.batchId, reason);
  }
  return reasons;
}

function routeReason({ brokenStep }: PlanBatch): UnplannedReason | null {
  return brokenStep === null ? null : { code: 'ROUTE', step: brokenStep };
}

function peopleReason(
  problem: Problem,
  teams: Teams,
  activity: Activity,
  known: Map<string, UnplannedReason | null>,
): UnplannedReason | null {
  const { step, skill, people, minutes, pausable } = activity;
  const key = JSON.stringify([step, skill, people, minutes, pausable]);
  let reason = known.get(key);
  if (reason === undefined) {
    const have = teams.able(skill).length;
    if (have < people) reason = { code: 'SKILL', step, skill, need: people, have };
    else {
      const fits = teams
        .teamsFor(activity)
        .some((team) => workFrom(team.calendar, problem.now, minutes, pausable) !== null);
      reason = fits ? null : { code: 'HOURS', step, minutes, pausable };
    }
    known.set(key, reason);
  }
  return reason;
}

function stationReason(problem: Problem, activity: Activity): UnplannedReason | null {
  for (const { resource, units } of activity.takes) {
    const station = problem.stations.find((candidate) => candidate.key === resource);
    if (!station || units <= station.capacity) continue;
    const { capacity } = station;
    return {
      code: 'STATION',
      step: activity.step,
      station: station.station,
      need: units,
      capacity,
    };
  }
  return null;
}

function clampReason(problem: Problem, { step, clamps }: Activity): UnplannedReason | null {
  if (!clamps) return null;
  const owned = problem.clamps
    .filter((stock) => stock.length >= clamps.length)
    .reduce((sum, stock) => sum + stock.count, 0);
  if (owned >= clamps.count) return null;
  return { code: 'CLAMPS', step, need: clamps.count, owned, length: clamps.length };
}
