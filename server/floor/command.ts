import { desc, eq, sql } from 'drizzle-orm';
import { reworkReason } from '#drizzle/tables/batch';
import { event } from '#drizzle/tables/event';
import { member } from '#drizzle/tables/member';
import type { FloorView } from '#shared/floor/judge';
import type { FloorChangeSet } from '#shared/floor/model';
import type { Verdict } from '#shared/floor/refusal';
import { conflictSentence } from '#shared/words/problem-words';
import { refusalSentence } from '#shared/words/refusal-words';
import type { ShopTransaction } from '#server/db/doors';
import { appendEvent, type FloorEventType } from '#server/db/events';
import { newId } from '#server/db/uuid';
import type { BatchPayload } from '#server/generated/schema';
import { memberOf, type Context } from '#server/http/context';
import { localId } from '#server/http/global-id';
import { problem } from '#server/http/problem';
import { notFound } from './not-found';
import { batchesThatHold, loadBatches, loadFloorShop, type LoadedBatch } from './load';
import { presentBatch } from './present';
import { storeChanges } from './store';

/** Back-dated facts are judged against what was occupied then; nothing older than this is looked at. */
const LOOK_BACK_MS = 32 * 24 * 3_600_000;

/** What one floor command is, beyond the batch it is about. */
export interface FloorCommandRequest {
  batchId: string;
  /** The version that the person saw; null for commands that name what they are about in another way. */
  version: number | null;
  type: (changes: FloorChangeSet) => FloorEventType;
  /** When it is said to have happened; null for now. */
  happenedAt: number | null;
  /** Whether it also matters what was occupied before then, as for taking back what gave something back. */
  looksBack?: true;
  /** Reasons that go with it, kept out of the event. Read once the rules have let it pass. */
  reasons: { override: string | null; rework: string | null };
  judge(view: FloorView, loaded: LoadedBatch, tx: ShopTransaction): Verdict | Promise<Verdict>;
  /** More for the event: ids and versions only. */
  data?: object;
}

type Outcome =
  { kind: 'DONE'; seq: number } | { kind: 'REFUSED'; problems: BatchPayload['problems'] };

/**
 * One floor command is one transaction: read the rows with their version, ask the rules, write the rows, append the
 * event. Commands of a shop run one after another, so that no two take the last clamp.
 */
export async function runFloorCommand(
  context: Context,
  request: FloorCommandRequest,
): Promise<BatchPayload> {
  const { services } = context;
  const principal = memberOf(context);
  const batchId = localId('batch', request.batchId);
  if (batchId === null) return notFound('batchId');
  const outcome = await services.doors.inShop(principal.shopId, async (tx): Promise<Outcome> => {
    await tx.execute(
      sql`select pg_advisory_xact_lock(hashtextextended(${`floor ${principal.shopId}`}, 0))`,
    );
    const now = services.now();
    const farthest = now.getTime() - LOOK_BACK_MS;
    const from = request.looksBack ? farthest : (request.happenedAt ?? now.getTime()) - 1;
    const lookBack = Math.max(from, farthest);
    const ids = [...new Set([batchId, ...(await batchesThatHold(tx, lookBack))])];
    const loaded = await loadBatches(tx, { ids }, now, lookBack);
    const target = loaded.find((candidate) => candidate.floor.id === batchId);
    if (!target) return { kind: 'REFUSED', problems: notFound('batchId').problems };
    if (request.version !== null && request.version !== target.floor.version) {
      return { kind: 'REFUSED', problems: [await conflict(tx, target)] };
    }
    const view: FloorView = {
      shop: await loadFloorShop(tx),
      batches: loaded.map((candidate) => candidate.floor),
      now: now.getTime(),
    };
    const verdict = await request.judge(view, target, tx);
    if (!verdict.ok) {
      const { refusal } = verdict;
      const words = { batchCode: target.floor.code, zone: view.shop.zone, now: view.now };
      const sentence = refusalSentence(refusal, words);
      return { kind: 'REFUSED', problems: [problem(refusal.code, sentence)] };
    }
    const { changes } = verdict;
    const happenedAt = new Date(Math.min(request.happenedAt ?? now.getTime(), now.getTime()));
    const why = request.reasons.override;
    const override =
      why === null ? null : { by: principal.memberId, at: happenedAt, reason: why.trim() };
    const overrideIds = await storeChanges(tx, principal.shopId, target.floor, changes, override);
    const seq = await appendEvent(tx, principal.shopId, {
      type: request.type(changes),
      by: principal.memberId,
      happenedAt,
      recordedAt: now,
      batchId,
      data: {
        version: target.floor.version + 1,
        changes,
        ...(overrideIds.length > 0 && { overrideIds }),
        ...(await keepReworkReason(tx, principal.shopId, batchId, request)),
        ...request.data,
      },
    });
    return { kind: 'DONE', seq };
  });
  if (outcome.kind === 'DONE') services.hub.wake();
  await context.forget();
  const batch = await context.read(async (tx) => {
    const now = services.now();
    const [loaded] = await loadBatches(tx, { ids: [batchId] }, now);
    return loaded ? presentBatch(loaded, now) : null;
  });
  return outcome.kind === 'DONE'
    ? { batch, problems: [], event: outcome.seq }
    : { batch, problems: outcome.problems, event: null };
}

async function keepReworkReason(
  tx: ShopTransaction,
  shopId: string,
  batchId: string,
  request: FloorCommandRequest,
): Promise<{ reasonId?: string }> {
  const { rework } = request.reasons;
  if (rework === null) return {};
  const id = newId();
  await tx.insert(reworkReason).values({ shopId, id, batchId, reason: rework.trim() });
  return { reasonId: id };
}

/** Someone else was first: says who, so that the two can talk. */
async function conflict(tx: ShopTransaction, target: LoadedBatch) {
  const [last] = await tx
    .select({ name: member.name })
    .from(event)
    .leftJoin(member, eq(member.id, event.by))
    .where(eq(event.batchId, target.floor.id))
    .orderBy(desc(event.seq))
    .limit(1);
  return problem(
    'VERSION_CONFLICT',
    conflictSentence(target.floor.code, last?.name ?? null),
    'version',
  );
}
