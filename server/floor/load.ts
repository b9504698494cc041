import { and, asc, desc, eq, gt, inArray, isNull, or, sql, type SQL } from 'drizzle-orm';
import type { NodePgDatabase } from 'drizzle-orm/node-postgres';
import { batch, holdOverride, occupation, routeCopy, stepRun } from '#drizzle/tables/batch';
import { design } from '#drizzle/tables/design';
import { event } from '#drizzle/tables/event';
import { forecast } from '#drizzle/tables/plan';
import { clampClass, shop, station } from '#drizzle/tables/shop';
import type { FloorBatch, FloorShop } from '#shared/floor/model';
import { UNDO_MINUTES } from '#shared/floor/undo';
import type { Instant } from '#shared/time/instant';
import { FLOOR_EVENT_TYPES } from '#server/db/events';

type Reader = Pick<NodePgDatabase, 'select' | 'execute' | 'selectDistinctOn'>;

/** A batch with what the API says of it beyond the rules. */
export interface LoadedBatch {
  floor: FloorBatch;
  designId: string;
  overridesSeen: ReadonlySet<string>;
  forecast: {
    readyAt: Date;
    nextStartAt: Date | null;
    slackMinutes: number | null;
    slackDays: number | null;
  } | null;
  undo: { event: number; by: string | null; until: Date } | null;
}

/** Which batches to load. */
export type BatchChoice = { ids: readonly string[] } | { codes: readonly string[] } | 'OPEN';

/**
 * Batches with all the rules look at. Occupations are the open ones, and with `endedAfter` also those that ended later
 * than that instant.
 */
export async function loadBatches(
  tx: Reader,
  choice: BatchChoice,
  now: Date,
  endedAfter: Instant | null = null,
): Promise<LoadedBatch[]> {
  const rows = await tx
    .select({ batch, design })
    .from(batch)
    .innerJoin(design, and(eq(design.shopId, batch.shopId), eq(design.id, batch.designId)))
    .where(chosen(choice))
    .orderBy(asc(batch.code));
  if (rows.length === 0) return [];
  const ids = rows.map((row) => row.batch.id);
  const routes = await routesOf(tx, [...new Set(rows.map((row) => row.batch.routeId))]);
  const runs = byBatch(await tx.select().from(stepRun).where(inArray(stepRun.batchId, ids)));
  const occupations = byBatch(
    await tx
      .select()
      .from(occupation)
      .where(and(inArray(occupation.batchId, ids), stillCounts(endedAfter))),
  );
  const overrides = byBatch(
    await tx
      .select()
      .from(holdOverride)
      .where(inArray(holdOverride.batchId, ids))
      .orderBy(asc(holdOverride.at)),
  );
  const forecasts = byBatch(await tx.select().from(forecast).where(inArray(forecast.batchId, ids)));
  const undos = await lastCommands(tx, ids, now);
  return rows.map(({ batch: row, design: made }) => {
    const route = routes.get(row.routeId);
    if (!route) throw new Error('A batch has lost its route.');
    const cutShort = overrides.get(row.id) ?? [];
    return {
      designId: row.designId,
      overridesSeen: new Set(cutShort.filter((o) => o.seenAt !== null).map((o) => o.id)),
      forecast: forecasts.get(row.id)?.[0] ?? null,
      undo: undos.get(row.id) ?? null,
      floor: {
        id: row.id,
        code: row.code,
        version: row.version,
        boards: row.boards,
        needs: {
          panelCount: made.panelCount,
          panelBoards: made.panelBoards,
          blocksPerBoard: made.blocksPerBoard,
          panelClamps: { count: made.panelClampCount, length: made.panelClampLength },
          blockClamps: { count: made.blockClampCount, length: made.blockClampLength },
        },
        route,
        dueDate: row.dueDate,
        shipBy: row.shipBy,
        releasedAt: row.releasedAt?.getTime() ?? null,
        shippedAt: row.shippedAt?.getTime() ?? null,
        assignedTo: row.assignedTo,
        runs: (runs.get(row.id) ?? []).map((run) => ({
          step: run.step,
          piece: run.piece,
          startedAt: run.startedAt?.getTime() ?? null,
          startedBy: run.startedBy,
          finishedAt: run.finishedAt?.getTime() ?? null,
          finishedBy: run.finishedBy,
          cutAt: run.cutAt?.getTime() ?? null,
          cutBy: run.cutBy,
        })),
        occupations: (occupations.get(row.id) ?? []).map((held) => ({
          resource: held.resource,
          isClamps: held.isClamps,
          amount: held.amount,
          step: held.step,
          piece: held.piece,
          since: held.since.getTime(),
          until: held.until?.getTime() ?? null,
        })),
        overrides: cutShort.map((o) => ({
          id: o.id,
          step: o.step,
          piece: o.piece,
          by: o.by,
          at: o.at.getTime(),
          reason: o.reason,
        })),
      },
    };
  });
}

/** The batches that hold something now, or did after an instant: the others do not matter to what is free. */
export async function batchesThatHold(tx: Reader, endedAfter: Instant): Promise<string[]> {
  const rows = await tx
    .selectDistinctOn([occupation.batchId], { id: occupation.batchId })
    .from(occupation)
    .where(stillCounts(endedAfter));
  return rows.map((row) => row.id);
}

/** The shop as the rules see it. */
export async function loadFloorShop(tx: Reader): Promise<FloorShop> {
  const [row] = await tx.select({ zone: shop.zone }).from(shop);
  if (!row) throw new Error('The shop is gone.');
  const stations = await tx.select().from(station).orderBy(asc(station.position));
  const clamps = await tx.select().from(clampClass).orderBy(asc(clampClass.length));
  return {
    zone: row.zone,
    stations: stations.map(({ key, name, unit, capacity }) => ({ key, name, unit, capacity })),
    clamps: clamps.map(({ key, length, count }) => ({ key, length, count })),
  };
}

function chosen(choice: BatchChoice): SQL | undefined {
  if (choice === 'OPEN') return isNull(batch.shippedAt);
  return 'ids' in choice
    ? inArray(batch.id, [...choice.ids])
    : inArray(batch.code, [...choice.codes]);
}

function stillCounts(endedAfter: Instant | null): SQL | undefined {
  return endedAfter === null
    ? isNull(occupation.until)
    : or(isNull(occupation.until), gt(occupation.until, new Date(endedAfter)));
}

async function routesOf(tx: Reader, ids: string[]) {
  const rows = await tx.select().from(routeCopy).where(inArray(routeCopy.id, ids));
  return new Map(rows.map((row) => [row.id, { id: row.id, steps: row.steps }]));
}

/** The last event of each batch, where it is a command that can still be undone. */
async function lastCommands(tx: Reader, ids: string[], now: Date) {
  const since = new Date(now.getTime() - UNDO_MINUTES * 60_000);
  const rows = await tx
    .selectDistinctOn([event.batchId], {
      batchId: event.batchId,
      seq: event.seq,
      type: event.type,
      by: event.by,
      recordedAt: event.recordedAt,
    })
    .from(event)
    .where(and(inArray(event.batchId, ids), gt(event.recordedAt, since), sql`type <> 'PLAN_MADE'`))
    .orderBy(event.batchId, desc(event.seq));
  return new Map(
    rows
      .filter((row) => row.type !== 'COMMAND_UNDONE')
      .filter((row) => FLOOR_EVENT_TYPES.some((type) => type === row.type))
      .map((row) => [
        row.batchId ?? '',
        {
          event: row.seq,
          by: row.by,
          until: new Date(row.recordedAt.getTime() + UNDO_MINUTES * 60_000),
        },
      ]),
  );
}

function byBatch<Row extends { batchId: string }>(rows: readonly Row[]): Map<string, Row[]> {
  const grouped = new Map<string, Row[]>();
  for (const row of rows) {
    const group = grouped.get(row.batchId);
    if (group) group.push(row);
    else grouped.set(row.batchId, [row]);
  }
  return grouped;
}
