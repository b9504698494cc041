import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { Activity, ActivityRef, Placement, Problem, Reason } from './model';

/** Names in each reason who had what the activity had to wait for: whoever gave it back at the moment it could start. */
export function withHolders(problem: Problem, placements: readonly Placement[]): Placement[] {
  const activities = new Map(problem.activities.map((activity) => [activity.id, activity]));
  const given = givenBack(problem, placements, activities);
  const at = (what: string, when: Instant) => given.get(`${what}@${when}`) ?? [];
  return placements.map((placement): Placement => {
    const { reason } = placement;
    const named = (what: readonly string[], when: Instant): ActivityRef[] => {
      const others = what.flatMap((each) => at(each, when));
      return [...new Map(others.map((ref) => [JSON.stringify(ref), ref])).values()];
    };
    const withNamed = (what: readonly string[], of: Extract<Reason, { holders: unknown }>) => ({
      ...placement,
      reason: { ...of, holders: named(what, of.at) },
    });
    switch (reason.code) {
      case 'STATION':
        return withNamed([`station ${reason.station}`], reason);
      case 'CLAMPS': {
        const length = activities.get(placement.activity)?.clamps?.length ?? 0n;
        const thatDo = problem.clamps.filter((stock) => stock.length >= length);
        return withNamed(
          thatDo.map((stock) => `clamps ${stock.key}`),
          reason,
        );
      }
      case 'PEOPLE':
        return withNamed(
          reason.people.map((id) => `person ${id}`),
          reason,
        );
      default:
        return placement;
    }
  });
}

function givenBack(
  problem: Problem,
  placements: readonly Placement[],
  activities: ReadonlyMap<string, Activity>,
): Map<string, ActivityRef[]> {
  const given = new Map<string, ActivityRef[]>();
  const ends = new Map(placements.map((placement) => [placement.activity, placement.end]));
  const stations = new Map(problem.stations.map(({ key, station }) => [key, station]));
  const endOf = (ids: readonly string[]) => Math.max(...ids.map((id) => ends.get(id) ?? -Infinity));
  const give = (what: string, end: number, by: ActivityRef) => {
    const key = `${what}@${Math.ceil(end / MINUTE_MS) * MINUTE_MS}`;
    const list = given.get(key);
    const { batchId, step, piece } = by;
    if (list) list.push({ batchId, step, piece });
    else given.set(key, [{ batchId, step, piece }]);
  };
  for (const held of problem.held) {
    const what = held.isClamps ? 'clamps' : 'station';
    const key = held.isClamps ? held.resource : (stations.get(held.resource) ?? held.resource);
    give(`${what} ${key}`, held.until ?? endOf(held.release), held);
  }
  for (const placement of placements) {
    const activity = activities.get(placement.activity);
    for (const take of activity?.takes ?? []) {
      const station = stations.get(take.resource) ?? take.resource;
      give(`station ${station}`, endOf(take.until), placement);
    }
    const clamped = endOf(activity?.clamps?.until ?? []);
    for (const { key } of placement.clamps) give(`clamps ${key}`, clamped, placement);
    for (const id of placement.people) {
      for (const { end } of placement.segments) give(`person ${id}`, end, placement);
    }
  }
  return given;
}
