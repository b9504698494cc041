import type { FloorShop, Occupation, Station } from '#shared/floor/model';
import { runOf } from '#shared/floor/progress';
import { CLAMPS } from '#shared/floor/resources';
import type { Instant } from '#shared/time/instant';
import type { WorkStep } from '#shared/route/route';
import type { BatchPieces } from './batch-pieces';
import type { Held, StationCapacity } from './model';

/**
 * A station that counts batches takes the pieces of one batch in turn in a plan: two people at one planer with a panel
 * each is not what "one batch" means, though the floor does not count it.
 */
export function takesTurns(station: Station, step: WorkStep): boolean {
  return (
    station.unit === 'BATCH' &&
    step.scope !== 'BATCH' &&
    step.station === station.key &&
    !step.takes.some((take) => take.resource === station.key)
  );
}

export function inTurnKey(station: string, batchId: string): string {
  return `${station}/${batchId}`;
}

/** The shop's stations, and for each batch the turns its pieces take at them. */
export function stationsFor(shop: FloorShop, batches: readonly BatchPieces[]): StationCapacity[] {
  const stations = [...shop.stations].sort((a, b) => (a.key < b.key ? -1 : 1));
  const turns = batches.flatMap((of) =>
    stations
      .filter((station) =>
        of.batch.route.steps.some((step) => step.kind === 'WORK' && takesTurns(station, step)),
      )
      .map((station) => ({
        key: inTurnKey(station.key, of.batch.id),
        station: station.key,
        capacity: 1,
        countsBatches: false,
      })),
  );
  return [
    ...stations.map((station) => ({
      key: station.key,
      station: station.key,
      capacity: station.capacity,
      countsBatches: station.unit === 'BATCH',
    })),
    ...turns,
  ];
}

/** What a batch keeps occupied now, and which work gives it back. */
export function heldBy(of: BatchPieces, shop: FloorShop, now: Instant): Held[] {
  const held: Held[] = [];
  for (const occupation of of.batch.occupations) {
    const { resource, isClamps, until } = occupation;
    if (until !== null && until <= now) continue;
    const known = isClamps
      ? shop.clamps.some((clamp) => clamp.key === resource)
      : shop.stations.some((station) => station.key === resource);
    const taker = of.batch.route.steps.find((step) => step.key === occupation.step);
    if (!known || taker?.kind !== 'WORK') continue;
    held.push(heldOf(of, occupation, taker));
  }
  return [...held, ...turnsHeld(of, shop)].sort((a, b) => (keyOf(a) < keyOf(b) ? -1 : 1));
}

function heldOf(of: BatchPieces, occupation: Occupation, taker: WorkStep): Held {
  const { resource, isClamps, amount, piece, until } = occupation;
  return {
    batchId: of.batch.id,
    step: taker.key,
    piece,
    resource,
    isClamps,
    units: amount,
    until,
    release: until === null ? of.release(taker, piece, isClamps ? CLAMPS : resource) : [],
  };
}

function turnsHeld(of: BatchPieces, shop: FloorShop): Held[] {
  return of.batch.route.steps.flatMap((step) => {
    const station = shop.stations.find((candidate) => candidate.key === stationOf(step));
    if (step.kind !== 'WORK' || !station || !takesTurns(station, step)) return [];
    return of
      .pieces(step)
      .filter((piece) => isUnderWay(of, step, piece))
      .map((piece) => ({
        batchId: of.batch.id,
        step: step.key,
        piece,
        resource: inTurnKey(station.key, of.batch.id),
        isClamps: false,
        units: 1,
        until: null,
        release: [of.id(step, piece)],
      }));
  });
}

function stationOf(step: { kind: string; station?: string | null }): string | null {
  return step.station ?? null;
}

function isUnderWay(of: BatchPieces, step: WorkStep, piece: number): boolean {
  const run = runOf(of.batch, step.key, piece);
  return run?.startedAt != null && run.finishedAt === null;
}

function keyOf(held: Held): string {
  return `${held.step}/${String(held.piece).padStart(4, '0')}/${held.resource}/${held.units}`;
}
