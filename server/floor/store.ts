import { and, eq, inArray, sql } from 'drizzle-orm';
import { batch, holdOverride, occupation, stepRun } from '#drizzle/tables/batch';
import type { FloorBatch, FloorChangeSet, StepRun } from '#shared/floor/model';
import type { ShopTransaction } from '#server/db/doors';
import { newId } from '#server/db/uuid';

/** Writes what a command changes, and the batch's next version. Returns the ids of the overrides written down. */
export async function storeChanges(
  tx: ShopTransaction,
  shopId: string,
  before: FloorBatch,
  changes: FloorChangeSet,
  override: { by: string; at: Date; reason: string } | null,
): Promise<string[]> {
  await storeRuns(tx, shopId, before.id, changes);
  for (const { occupation: held, at } of changes.released) {
    await tx
      .update(occupation)
      .set({ until: new Date(at) })
      .where(
        and(
          eq(occupation.batchId, before.id),
          eq(occupation.resource, held.resource),
          eq(occupation.step, held.step),
          eq(occupation.piece, held.piece),
          eq(occupation.since, new Date(held.since)),
        ),
      );
  }
  if (changes.taken.length > 0) {
    await tx
      .insert(occupation)
      .values(
        changes.taken.map((taken) => ({
          shopId,
          batchId: before.id,
          resource: taken.resource,
          isClamps: taken.isClamps,
          amount: taken.amount,
          step: taken.step,
          piece: taken.piece,
          since: new Date(taken.since),
          until: null,
        })),
      )
      .onConflictDoUpdate({
        target: [
          occupation.shopId,
          occupation.batchId,
          occupation.resource,
          occupation.step,
          occupation.piece,
          occupation.since,
        ],
        set: { until: null, amount: sql`excluded.amount` },
      });
  }
  const overrideIds = changes.cut.map(() => newId());
  if (override && changes.cut.length > 0) {
    await tx.insert(holdOverride).values(
      changes.cut.map((cut, i) => ({
        shopId,
        id: overrideIds[i] ?? newId(),
        batchId: before.id,
        step: cut.step,
        piece: cut.piece,
        ...override,
      })),
    );
  }
  const { releasedAt, shippedAt, assignedTo } = changes.fields;
  await tx
    .update(batch)
    .set({
      version: before.version + 1,
      ...(releasedAt && { releasedAt: maybeDate(releasedAt.after) }),
      ...(shippedAt && { shippedAt: maybeDate(shippedAt.after) }),
      ...(assignedTo && { assignedTo: assignedTo.after }),
    })
    .where(eq(batch.id, before.id));
  return overrideIds;
}

async function storeRuns(
  tx: ShopTransaction,
  shopId: string,
  batchId: string,
  changes: FloorChangeSet,
): Promise<void> {
  const written = changes.runs.flatMap((change) => change.after ?? []);
  if (written.length > 0) {
    await tx
      .insert(stepRun)
      .values(written.map((run) => rowOf(shopId, batchId, run)))
      .onConflictDoUpdate({
        target: [stepRun.shopId, stepRun.batchId, stepRun.step, stepRun.piece],
        set: {
          startedAt: sql`excluded.started_at`,
          startedBy: sql`excluded.started_by`,
          finishedAt: sql`excluded.finished_at`,
          finishedBy: sql`excluded.finished_by`,
          cutAt: sql`excluded.cut_at`,
          cutBy: sql`excluded.cut_by`,
        },
      });
  }
  const gone = changes.runs.filter((change) => change.after === null);
  if (gone.length > 0) {
    await tx.delete(stepRun).where(
      and(
        eq(stepRun.batchId, batchId),
        inArray(
          sql`${stepRun.step} || '/' || ${stepRun.piece}`,
          gone.map((change) => `${change.step}/${change.piece}`),
        ),
      ),
    );
  }
}

function rowOf(shopId: string, batchId: string, run: StepRun) {
  return {
    shopId,
    batchId,
    step: run.step,
    piece: run.piece,
    startedAt: maybeDate(run.startedAt),
    startedBy: run.startedBy,
    finishedAt: maybeDate(run.finishedAt),
    finishedBy: run.finishedBy,
    cutAt: maybeDate(run.cutAt),
    cutBy: run.cutBy,
  };
}

function maybeDate(at: number | null): Date | null {
  return at === null ? null : new Date(at);
}
