import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { ClampClass, ClampNeed, FloorBatch, FloorShop, Occupation, Station } from './model';
import { piecesOf, relatedPieces } from './pieces';
import { isDone, standardMinutes, waitOn } from './progress';
import type { Holder } from './refusal';
import { stepAt, type StepScope, type WorkStep } from '#shared/route/route';

/** The word in a route's `takes` that stands for the clamps a piece needs. */
export const CLAMPS = 'CLAMPS';

/** An occupation with the batch that has it. */
export interface Held {
  batch: FloorBatch;
  occupation: Occupation;
}

/** What occupies a resource at any moment from `from` on. */
export function heldFrom(
  batches: readonly FloorBatch[],
  resource: string,
  isClamps: boolean,
  from: Instant,
): Held[] {
  return batches.flatMap((batch) =>
    batch.occupations
      .filter((o) => o.resource === resource && o.isClamps === isClamps)
      .filter((o) => o.since !== o.until && (o.until === null || o.until > from))
      .map((occupation) => ({ batch, occupation })),
  );
}

/** The highest use of a station at any moment from `from` on, in the unit its capacity counts. */
export function stationPeak(
  station: Station,
  batches: readonly FloorBatch[],
  from: Instant,
): number {
  return peak(heldFrom(batches, station.key, false, from), from, station.unit === 'BATCH');
}

/** The highest number of clamps of a class in use at any moment from `from` on. */
export function clampPeak(
  clamp: ClampClass,
  batches: readonly FloorBatch[],
  from: Instant,
): number {
  return peak(heldFrom(batches, clamp.key, true, from), from, false);
}

/** How much of a station a step takes for one piece. A station that counts batches counts each batch once. */
export function stationUnits(station: Station, batch: FloorBatch, scope: StepScope): number {
  if (station.unit !== 'BOARD') return 1;
  return Math.ceil(batch.boards / piecesOf(batch, scope).length);
}

/** The clamps a piece needs; none for work on the whole batch. */
export function clampNeedOf(batch: FloorBatch, scope: StepScope): ClampNeed | null {
  if (scope === 'PANEL') return batch.needs.panelClamps;
  if (scope === 'BLOCK') return batch.needs.blockClamps;
  return null;
}

/**
 * Clamps for one piece out of what is free, the shortest that will do first, so that the long ones stay free for the
 * wide pieces; null when there are not enough. Classes may be mixed on one piece.
 */
export function chooseClamps(
  shop: FloorShop,
  need: ClampNeed,
  free: ReadonlyMap<string, number>,
): { key: string; amount: number }[] | null {
  const chosen: { key: string; amount: number }[] = [];
  let missing = need.count;
  for (const clamp of clampsThatDo(shop, need)) {
    const amount = Math.min(missing, free.get(clamp.key) ?? 0);
    if (amount > 0) chosen.push({ key: clamp.key, amount });
    missing -= amount;
  }
  return missing > 0 ? null : chosen;
}

/** The clamp classes long enough, the shortest first. */
export function clampsThatDo(shop: FloorShop, need: ClampNeed): ClampClass[] {
  return shop.clamps
    .filter((clamp) => clamp.length >= need.length)
    .sort((a, b) => (a.length < b.length ? -1 : a.length > b.length ? 1 : 0));
}

/** Who of those that hold something gives it back first: when it is expected, or (for a time gone by) when it was. */
export function firstToFree(held: readonly Held[], now: Instant): Holder | null {
  const holders = held.map(({ batch, occupation }) => ({
    batchCode: batch.code,
    freeAt: occupation.until ?? expectedFreeAt(batch, occupation, now),
  }));
  holders.sort((a, b) => (a.freeAt ?? Infinity) - (b.freeAt ?? Infinity));
  return holders[0] ?? null;
}

/**
 * When an occupation is expected to end if people come to it as soon as they may: the end of the waits it lasts through
 * and the standard time of the step that gives it back. Null when that step cannot be told yet.
 */
export function expectedFreeAt(
  batch: FloorBatch,
  occupation: Occupation,
  now: Instant,
): Instant | null {
  const taker = stepAt(batch.route, occupation.step);
  if (taker?.step.kind !== 'WORK') return null;
  const until = releasingStep(taker.step, occupation);
  const giver = stepAt(batch.route, until);
  if (giver?.step.kind !== 'WORK') return null;
  let at = Math.max(now, occupation.since + standardMinutes(batch, taker.step) * MINUTE_MS);
  if (until === taker.step.key) return at;
  for (const step of batch.route.steps.slice(taker.index, giver.index)) {
    if (step.kind !== 'WAIT') continue;
    const began = at;
    for (const piece of relatedPieces(batch, step.scope, taker.step.scope, occupation.piece)) {
      if (isDone(batch, step, piece, now)) continue;
      const wait = waitOn(batch, step, piece);
      at = Math.max(at, wait ? wait.clearAt : began + step.minMinutes * MINUTE_MS);
    }
  }
  return at + standardMinutes(batch, giver.step) * MINUTE_MS;
}

/** The key of the step whose finish ends an occupation. */
export function releasingStep(taker: WorkStep, occupation: Occupation): string {
  const named = occupation.isClamps ? CLAMPS : occupation.resource;
  return taker.takes.find((take) => take.resource === named)?.until ?? taker.key;
}

/** The load of a station now, for a column's head. */
export function stationLoad(
  station: Station,
  batches: readonly FloorBatch[],
  now: Instant,
): { used: number; capacity: number } {
  return { used: stationPeak(station, batches, now), capacity: station.capacity };
}

/** All clamps in use now, and all there are. */
export function clampLoad(
  shop: FloorShop,
  batches: readonly FloorBatch[],
  now: Instant,
): { used: number; capacity: number } {
  return {
    used: shop.clamps.reduce((sum, clamp) => sum + clampPeak(clamp, batches, now), 0),
    capacity: shop.clamps.reduce((sum, clamp) => sum + clamp.count, 0),
  };
}

function peak(held: readonly Held[], from: Instant, countBatches: boolean): number {
  const moments = new Set([from, ...held.map(({ occupation }) => occupation.since)]);
  let highest = 0;
  for (const moment of moments) {
    if (moment < from) continue;
    const active = held.filter(
      ({ occupation: o }) => o.since <= moment && (o.until === null || o.until > moment),
    );
    const use = countBatches
      ? new Set(active.map(({ batch }) => batch.id)).size
      : active.reduce((sum, { occupation }) => sum + occupation.amount, 0);
    highest = Math.max(highest, use);
  }
  return highest;
}
