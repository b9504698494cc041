import { createHash } from 'node:crypto';
import { and, eq, inArray, sql } from 'drizzle-orm';
import { board, batch } from '#drizzle/tables/batch';
import { idempotencyKey } from '#drizzle/tables/access';
import { design } from '#drizzle/tables/design';
import { lineBatch, orderLine, shopOrder } from '#drizzle/tables/order';
import { profile, shop, shopCounter } from '#drizzle/tables/shop';
import { batchSchema } from '#shared/batches/batch-schema';
import { shipByOf } from '#shared/orders/ship-by';
import { resolveRoute, type FinishProfile, type GlueProfile } from '#shared/route/template';
import type { RouteStep } from '#shared/route/route';
import { toLocal } from '#shared/time/zone';
import { problemSentence } from '#shared/words/problem-words';
import type { ShopTransaction } from '#server/db/doors';
import { appendEvent } from '#server/db/events';
import { newId } from '#server/db/uuid';
import { loadBatches } from '#server/floor/load';
import { notFound } from '#server/floor/not-found';
import { presentBatch } from '#server/floor/present';
import type { BatchPayload, CreateBatchInput } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { inputProblems, problem, type Problem } from '#server/http/problem';
import { copyRoute } from './copy-route';

/** What a new batch is made from, once every id and figure was read. */
interface NewBatch {
  designId: string;
  boards: number;
  dueDate: string | null;
  lineIds: string[];
}

type Outcome = { id: string; seq: number | null } | { problems: Problem[] };

/** Makes a batch with its own copy of the shop's route. It stands in QUEUED until someone lets it onto the floor. */
export async function createBatch(
  context: Context,
  input: CreateBatchInput,
): Promise<BatchPayload> {
  const { services } = context;
  const { shopId, memberId } = memberOf(context);
  const parsed = batchSchema.safeParse({
    boards: input.boards,
    dueDate: input.dueDate ?? null,
    idempotencyKey: input.idempotencyKey ?? null,
  });
  if (!parsed.success) return refused(inputProblems(parsed));
  const designId = localId('design', input.designId);
  if (designId === null) return notFound('designId');
  const lineIds = (input.orderLineIds ?? []).map((id) => localId('line', id));
  if (lineIds.length > 50 || lineIds.includes(null)) return notFound('orderLineIds');
  const wanted: NewBatch = {
    designId,
    boards: parsed.data.boards,
    dueDate: parsed.data.dueDate,
    lineIds: lineIds.filter((id) => id !== null),
  };
  const key = parsed.data.idempotencyKey;
  const outcome = await services.doors.inShop(shopId, (tx) =>
    makeBatch(tx, { shopId, memberId, now: services.now(), key }, wanted),
  );
  if ('problems' in outcome) return refused(outcome.problems);
  if (outcome.seq !== null) services.hub.wake();
  await context.forget();
  return context.read(async (tx) => {
    const now = services.now();
    const [loaded] = await loadBatches(tx, { ids: [outcome.id] }, now);
    return {
      batch: loaded ? presentBatch(loaded, now) : null,
      problems: [],
      event: outcome.seq,
    };
  });
}

async function makeBatch(
  tx: ShopTransaction,
  by: { shopId: string; memberId: string; now: Date; key: string | null },
  wanted: NewBatch,
): Promise<Outcome> {
  const { shopId, memberId, now, key } = by;
  const requestHash = createHash('sha256').update(JSON.stringify(wanted)).digest('hex');
  if (key !== null) {
    const repeated = await repeatedCall(tx, by, key, requestHash);
    if (repeated) return repeated;
  }
  const [settings] = await tx.select().from(shop);
  const [made] = await tx.select().from(design).where(eq(design.id, wanted.designId));
  if (!settings) throw new Error('The shop is gone.');
  if (!made) return { problems: notFound('designId').problems };
  const today = toLocal(settings.zone, now.getTime()).date;
  if (wanted.dueDate !== null && wanted.dueDate < today) {
    return { problems: [problem('INVALID_INPUT', 'The due date is in the past.', 'dueDate')] };
  }
  const lines = await linesFor(tx, wanted);
  if (lines === null) {
    const sentence = 'An order line is not there, or is for another design.';
    return { problems: [problem('NOT_FOUND', sentence, 'orderLineIds')] };
  }
  const id = newId(now.getTime());
  const [counter] = await tx
    .update(shopCounter)
    .set({
      batchCode: sql`${shopCounter.batchCode} + 1`,
      boardSerial: sql`${shopCounter.boardSerial} + ${wanted.boards}`,
    })
    .where(eq(shopCounter.shopId, shopId))
    .returning();
  if (!counter) throw new Error('The shop has no counter.');
  const shipBys = lines.map((line) => line.shipBy).sort();
  const dues = lines.map((line) => line.dueDate).sort();
  await tx.insert(batch).values({
    shopId,
    id,
    code: `${settings.batchPrefix}-${String(counter.batchCode).padStart(3, '0')}`,
    designId: made.id,
    routeId: await copyRoute(tx, shopId, await routeSteps(tx, settings.route)),
    boards: wanted.boards,
    dueDate: wanted.dueDate ?? dues[0] ?? null,
    // A batch aims at the earliest ship-by of the lines it makes, unless it has none.
    shipBy:
      shipBys[0] ?? (wanted.dueDate === null ? null : shipByOf(settings, wanted.dueDate, settings)),
    createdAt: now,
  });
  await tx.insert(board).values(
    Array.from({ length: wanted.boards }, (_, i) => ({
      shopId,
      id: newId(now.getTime()),
      batchId: id,
      serial: counter.boardSerial - wanted.boards + 1 + i,
    })),
  );
  await allot(tx, shopId, id, wanted.boards, lines);
  if (key !== null) {
    await tx.insert(idempotencyKey).values({
      shopId,
      caller: memberId,
      operation: 'createBatch',
      key,
      requestHash,
      result: { id },
      createdAt: now,
    });
  }
  const seq = await appendEvent(tx, shopId, {
    type: 'BATCH_MADE',
    by: memberId,
    happenedAt: now,
    recordedAt: now,
    batchId: id,
    data: { version: 1, designId: made.id, boards: wanted.boards, lineIds: wanted.lineIds },
  });
  return { id, seq };
}

/** The answer of an earlier call with the same key, or what is wrong with the repetition. */
async function repeatedCall(
  tx: ShopTransaction,
  { shopId, memberId }: { shopId: string; memberId: string },
  key: string,
  requestHash: string,
): Promise<Outcome | null> {
  // Two calls at once with one key: the second waits here and finds the first one's row.
  await tx.execute(
    sql`select pg_advisory_xact_lock(hashtextextended(${`batch key ${shopId} ${memberId} ${key}`}, 0))`,
  );
  const [known] = await tx
    .select()
    .from(idempotencyKey)
    .where(
      and(
        eq(idempotencyKey.caller, memberId),
        eq(idempotencyKey.operation, 'createBatch'),
        eq(idempotencyKey.key, key),
      ),
    );
  if (!known) return null;
  if (known.requestHash === requestHash) return { id: known.result.id, seq: null };
  const sentence = problemSentence({ code: 'IDEMPOTENCY_MISMATCH' });
  return { problems: [problem('IDEMPOTENCY_MISMATCH', sentence, 'idempotencyKey')] };
}

/** The order lines a batch is for, the most urgent first; null when one is not there or wants another design. */
async function linesFor(tx: ShopTransaction, wanted: NewBatch) {
  if (wanted.lineIds.length === 0) return [];
  const lines = await tx
    .select({
      id: orderLine.id,
      count: orderLine.count,
      designId: orderLine.designId,
      shipBy: shopOrder.shipBy,
      dueDate: shopOrder.dueDate,
    })
    .from(orderLine)
    .innerJoin(shopOrder, eq(shopOrder.id, orderLine.orderId))
    .where(inArray(orderLine.id, wanted.lineIds));
  const fit =
    lines.length === new Set(wanted.lineIds).size &&
    lines.every((line) => line.designId === wanted.designId);
  return fit ? lines.sort((a, b) => (a.shipBy < b.shipBy ? -1 : 1)) : null;
}

/** Gives the batch's boards to the lines, the most urgent first, as far as they go. */
async function allot(
  tx: ShopTransaction,
  shopId: string,
  batchId: string,
  boards: number,
  lines: readonly { id: string; count: number }[],
): Promise<void> {
  if (lines.length === 0) return;
  const given = await tx
    .select({ lineId: lineBatch.lineId, boards: sql<number>`sum(${lineBatch.boards})::int` })
    .from(lineBatch)
    .where(
      inArray(
        lineBatch.lineId,
        lines.map((line) => line.id),
      ),
    )
    .groupBy(lineBatch.lineId);
  let left = boards;
  for (const line of lines) {
    const already = given.find((row) => row.lineId === line.id)?.boards ?? 0;
    const share = Math.min(left, Math.max(0, line.count - already));
    if (share === 0) continue;
    await tx.insert(lineBatch).values({ shopId, lineId: line.id, batchId, boards: share });
    left -= share;
  }
}

async function routeSteps(
  tx: ShopTransaction,
  template: Parameters<typeof resolveRoute>[0],
): Promise<RouteStep[]> {
  const usual = await tx.select().from(profile).where(eq(profile.usual, true));
  const figures = usual.map((row) => row.figures);
  const glue = figures.find((candidate): candidate is GlueProfile => candidate.kind === 'GLUE');
  const finish = figures.find(
    (candidate): candidate is FinishProfile => candidate.kind === 'FINISH',
  );
  if (!glue || !finish) throw new Error('The shop has no usual glue or finish.');
  return resolveRoute(template, glue, finish);
}

function refused(problems: Problem[]): BatchPayload {
  return { batch: null, problems, event: null };
}
