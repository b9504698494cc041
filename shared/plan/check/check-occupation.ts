import type { Placement } from '../model';
import type { View } from './violation';

/** Something taken over a time; facts are never to blame for being too many. */
interface Use {
  batchId: string;
  activity: string;
  units: number;
  from: number;
  to: number;
  isFact: boolean;
}

/** No station holds more than it takes. */
export function checkStations(view: View): void {
  const planned = new Map<string, Use[]>();
  for (const [placement, take] of takesOf(view)) {
    const uses = planned.get(take.resource) ?? [];
    planned.set(take.resource, uses);
    uses.push(useOf(view, placement, take.units, take.until));
  }
  for (const station of view.problem.stations) {
    sweep(
      [...factUses(view, station.key, false), ...(planned.get(station.key) ?? [])],
      station.capacity,
      station.countsBatches,
      (use, level) =>
        view.say('STATION', use.activity, `${station.key} holds ${level} of ${station.capacity}`),
    );
  }
}

/** Each piece has enough clamps that are long enough, and no class has more in use than there are. */
export function checkClamps(view: View): void {
  const { problem, activities, placements, say } = view;
  for (const [id, placement] of placements) {
    const need = activities.get(id)?.clamps ?? null;
    const count = placement.clamps.reduce((sum, { amount }) => sum + amount, 0);
    if (count !== (need?.count ?? 0) || placement.clamps.some(({ amount }) => amount <= 0)) {
      say('CLAMPS', id, `has ${count} clamps instead of ${need?.count ?? 0}`);
    }
    for (const { key } of placement.clamps) {
      const stock = problem.clamps.find((candidate) => candidate.key === key);
      if (!stock || stock.length < (need?.length ?? 0n)) {
        say('CLAMP_LENGTH', id, `has clamps of ${key}, which are too short`);
      }
    }
  }
  for (const { key, count } of problem.clamps) {
    const uses = factUses(view, key, true);
    for (const [id, placement] of placements) {
      const until = activities.get(id)?.clamps?.until ?? [];
      const mine = placement.clamps.filter((choice) => choice.key === key);
      const units = mine.reduce((sum, { amount }) => sum + amount, 0);
      if (units > 0) uses.push(useOf(view, placement, units, until));
    }
    sweep(uses, count, false, (use, level) =>
      say('CLAMPS', use.activity, `${level} of ${count} ${key} are in use`),
    );
  }
}

function* takesOf({ activities, placements }: View) {
  for (const [id, placement] of placements) {
    for (const take of activities.get(id)?.takes ?? []) yield [placement, take] as const;
  }
}

function useOf(
  view: View,
  { activity, batchId, start }: Placement,
  units: number,
  until: readonly string[],
): Use {
  const to = until.length === 0 ? Infinity : Math.max(...until.map((id) => view.endOf(id)));
  return { batchId, activity, units, from: start, to, isFact: false };
}

function factUses({ problem, endOf }: View, key: string, isClamps: boolean): Use[] {
  return problem.held
    .filter((held) => held.resource === key && held.isClamps === isClamps)
    .map(({ batchId, step, piece, units, until, release }) => ({
      batchId,
      activity: `${batchId}/${step}/${piece}`,
      units,
      from: problem.now,
      to: until ?? (release.length === 0 ? Infinity : Math.max(...release.map(endOf))),
      isFact: true,
    }));
}

/**
 * Goes through the moments at which use changes, and blames planned work that is there while it is too much. Where
 * batches count, a planned piece adds nothing to a batch that is there as a fact.
 */
function sweep(
  uses: readonly Use[],
  capacity: number,
  countsBatches: boolean,
  blame: (use: Use, level: number) => void,
): void {
  const blamed = new Set<Use>();
  const real = uses.filter((use) => use.from < use.to).sort((a, b) => a.from - b.from);
  const moments = [...new Set(real.flatMap((use) => [use.from, use.to]))].sort((a, b) => a - b);
  let next = 0;
  let active: Use[] = [];
  for (const moment of moments) {
    active = active.filter((use) => use.to > moment);
    for (let use = real[next]; use && use.from <= moment; use = real[++next]) active.push(use);
    const level = countsBatches
      ? new Set(active.map((use) => use.batchId)).size
      : active.reduce((sum, use) => sum + use.units, 0);
    if (level <= capacity) continue;
    const facts = active.filter((use) => use.isFact);
    for (const use of active) {
      if (use.isFact || blamed.has(use)) continue;
      if (countsBatches && facts.some((fact) => fact.batchId === use.batchId)) continue;
      blamed.add(use);
      blame(use, level);
    }
  }
}
