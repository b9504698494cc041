import { expect } from 'vitest';
import type { FloorBatch, FloorShop } from '#shared/floor/model';
import { piecesOf, relatedPieces } from '#shared/floor/pieces';
import { runOf, waitOn } from '#shared/floor/progress';

/** No work started inside a hold that nobody has cut, nor before the work before it was done; every cut is on record. */
export function expectNothingTooSoon(batch: FloorBatch): void {
  batch.route.steps.forEach((step, index) => {
    if (step.kind !== 'WORK') return;
    for (const piece of piecesOf(batch, step.scope)) {
      const startedAt = runOf(batch, step.key, piece)?.startedAt ?? null;
      if (startedAt === null) continue;
      for (const before of batch.route.steps.slice(0, index)) {
        for (const related of relatedPieces(batch, before.scope, step.scope, piece)) {
          const what = `${step.key}/${piece} of ${batch.code} after ${before.key}/${related}`;
          if (before.kind === 'WORK') {
            const finishedAt = runOf(batch, before.key, related)?.finishedAt ?? null;
            expect(finishedAt, what).not.toBeNull();
            expect(finishedAt, what).toBeLessThanOrEqual(startedAt);
            continue;
          }
          const wait = waitOn(batch, before, related);
          expect(wait?.clearAt, what).toBeLessThanOrEqual(startedAt);
          if (!wait?.cut) continue;
          const written = batch.overrides.filter(
            (override) => override.step === before.key && override.piece === related,
          );
          expect(written.length, what).toBeGreaterThan(0);
        }
      }
    }
  });
}

/** No clamp on two pieces and no station beyond its capacity, at any instant of the whole history. */
export function expectCapacityKept(shop: FloorShop, batches: readonly FloorBatch[]): void {
  const all = batches.flatMap((batch) =>
    batch.occupations.map((o) => ({ ...o, batchId: batch.id })),
  );
  for (const at of new Set(all.map((o) => o.since))) {
    const active = all.filter((o) => o.since <= at && (o.until === null || o.until > at));
    for (const clamp of shop.clamps) {
      const used = active.filter((o) => o.isClamps && o.resource === clamp.key);
      expect(
        used.reduce((sum, o) => sum + o.amount, 0),
        clamp.key,
      ).toBeLessThanOrEqual(clamp.count);
    }
    for (const station of shop.stations) {
      const used = active.filter((o) => !o.isClamps && o.resource === station.key);
      const level =
        station.unit === 'BATCH'
          ? new Set(used.map((o) => o.batchId)).size
          : used.reduce((sum, o) => sum + o.amount, 0);
      expect(level, station.key).toBeLessThanOrEqual(station.capacity);
    }
  }
}
