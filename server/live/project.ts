import { and, asc, eq, gt, lte } from 'drizzle-orm';
import { event } from '#drizzle/tables/event';
import { shopCounter } from '#drizzle/tables/shop';
import type { Doors } from '#server/db/doors';
import type { Batch } from '#server/generated/schema';
import { loadBatches } from '#server/floor/load';
import { presentBatch } from '#server/floor/present';

/** How many events a subscriber may be behind before it must read everything anew. */
export const RESET_AFTER = 1_000;

/** Events of one shop, made into what subscribers are shown. Made once, whoever gets it. */
export interface ShopMessage {
  shopId: string;
  /** The number of the last event in it. */
  seq: number;
  now: Date;
  reset: boolean;
  shopChanged: boolean;
  batches: Batch[];
  /** The member of the last event. */
  by: string | null;
}

/** Kinds of events after which settings, people, designs or the air are read anew. */
const SHOP_EVENTS = ['SHOP_CHANGED', 'MEMBER_CHANGED', 'DESIGN_MADE', 'READING_MADE'];

/** The number of a shop's last event. */
export function currentSeq(doors: Doors, shopId: string): Promise<number> {
  return doors.readShop(shopId, async (tx) => {
    const [row] = await tx.select({ seq: shopCounter.seq }).from(shopCounter);
    return row?.seq ?? 0;
  });
}

/** The message for the events in (after, upTo]; null when they are not there any more. */
export function projectEvents(
  doors: Doors,
  shopId: string,
  after: number,
  upTo: number,
  now: Date,
): Promise<ShopMessage | null> {
  return doors.readShop(shopId, async (tx) => {
    const events = await tx
      .select({ type: event.type, by: event.by, batchId: event.batchId, data: event.data })
      .from(event)
      .where(and(eq(event.shopId, shopId), gt(event.seq, after), lte(event.seq, upTo)))
      .orderBy(asc(event.seq));
    if (events.length !== upTo - after) return null;
    const ids = new Set<string>();
    for (const { batchId, type, data } of events) {
      if (batchId) ids.add(batchId);
      if (type === 'PLAN_MADE') {
        for (const id of (data as { batchIds?: string[] }).batchIds ?? []) ids.add(id);
      }
      // Not an event of the batch, which would keep its last command from being undone.
      if (type === 'OVERRIDE_SEEN') ids.add((data as { batchId: string }).batchId);
    }
    const loaded = ids.size > 0 ? await loadBatches(tx, { ids: [...ids] }, now) : [];
    return {
      shopId,
      seq: upTo,
      now,
      reset: false,
      shopChanged: events.some(({ type }) => SHOP_EVENTS.includes(type)),
      batches: loaded.map((batch) => presentBatch(batch, now)),
      by: events.at(-1)?.by ?? null,
    };
  });
}
