import type { FloorBatch, FloorShop } from '#shared/floor/model';
import { CLAMPS, clampLoad, stationLoad } from '#shared/floor/resources';
import type { Route, Stage } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';

/** What a column's head says of a station or of the clamps. */
export interface ResourceLoad {
  readonly name: string;
  readonly used: number;
  readonly capacity: number;
}

/** A column's head: the resources of its stage, and the bar of the one that counts most. */
export interface StageLoad {
  readonly resources: readonly ResourceLoad[];
  readonly bar: LoadBar;
}

/** Parts of a whole: under work now, kept through a wait, and how many there are. */
export interface LoadBar {
  readonly worked: number;
  readonly held: number;
  readonly capacity: number;
}

/** Keys of the stations that the steps of a stage use in any of the routes, in order; CLAMPS first where clamps are taken. */
export function resourcesOf(stage: Stage, routes: Iterable<Route>): string[] {
  const keys = new Set<string>();
  for (const route of routes) {
    for (const step of route.steps) {
      if (step.stage !== stage || step.kind !== 'WORK') continue;
      for (const take of step.takes) keys.add(take.resource);
      if (step.station) keys.add(step.station);
    }
  }
  return [...keys].sort((a, b) => Number(b === CLAMPS) - Number(a === CLAMPS));
}

export function stageLoad(
  stage: Stage,
  shop: FloorShop,
  routes: Iterable<Route>,
  batches: readonly FloorBatch[],
  now: Instant,
): StageLoad {
  const keys = resourcesOf(stage, routes);
  const resources = keys.flatMap((key): ResourceLoad[] => {
    if (key === CLAMPS) return [{ name: 'clamps', ...clampLoad(shop, batches, now) }];
    const station = shop.stations.find((each) => each.key === key);
    return station ? [{ name: station.name, ...stationLoad(station, batches, now) }] : [];
  });
  return { resources, bar: barOf(keys, shop, batches) };
}

/** Clamps where there are some, else the places of what keeps boards through a wait, else all stations together. */
function barOf(keys: readonly string[], shop: FloorShop, batches: readonly FloorBatch[]): LoadBar {
  if (keys.includes(CLAMPS)) {
    const capacity = shop.clamps.reduce((sum, clamp) => sum + clamp.count, 0);
    return split(batches, capacity, (held) => held.isClamps);
  }
  const stations = shop.stations.filter((station) => keys.includes(station.key));
  const rack = stations.find((station) => station.unit === 'BOARD');
  const shown = rack ? [rack] : stations;
  const byBatch = new Set(shown.filter(({ unit }) => unit === 'BATCH').map(({ key }) => key));
  const capacity = shown.reduce((sum, station) => sum + station.capacity, 0);
  return split(
    batches,
    capacity,
    (held) => !held.isClamps && shown.some((station) => station.key === held.resource),
    byBatch,
  );
}

function split(
  batches: readonly FloorBatch[],
  capacity: number,
  counts: (held: FloorBatch['occupations'][number]) => boolean,
  byBatch: ReadonlySet<string> = new Set(),
): LoadBar {
  let worked = 0;
  let held = 0;
  for (const batch of batches) {
    const seen = new Set<string>();
    for (const occupation of batch.occupations) {
      if (occupation.until !== null || !counts(occupation)) continue;
      // A station that takes whole batches has this one once, however many of its pieces are on it.
      if (byBatch.has(occupation.resource)) {
        if (seen.has(occupation.resource)) continue;
        seen.add(occupation.resource);
      }
      const run = batch.runs.find(
        (each) => each.step === occupation.step && each.piece === occupation.piece,
      );
      if (run?.finishedAt == null) worked += occupation.amount;
      else held += occupation.amount;
    }
  }
  return { worked, held, capacity };
}

/** "planer free", "bench full", "clamps 14 of 18". */
export function loadWords({ name, used, capacity }: ResourceLoad): string {
  const short = name.replace(/^(?:glue|table|sanding|finishing) (bench|saw)$/, '$1');
  if (capacity <= 1) return `${short} ${used < capacity ? 'free' : 'busy'}`;
  if (used === 0) return `${short} free`;
  return used >= capacity ? `${short} full` : `${short} ${used} of ${capacity}`;
}
