import { sql } from 'drizzle-orm';
import type { ShopTransaction } from './doors';

/** Kinds of events. What happened to a batch on the floor carries its change set in `data`. */
export const FLOOR_EVENT_TYPES = [
  'STEP_STARTED',
  'STEP_FINISHED',
  'BATCH_MOVED',
  'BATCH_REWORKED',
  'BATCH_ASSIGNED',
  'COMMAND_UNDONE',
] as const;
export type FloorEventType = (typeof FLOOR_EVENT_TYPES)[number];

export type EventType =
  | FloorEventType
  | 'BATCH_MADE'
  | 'OVERRIDE_SEEN'
  | 'ORDER_MADE'
  | 'DESIGN_MADE'
  | 'SHOP_CHANGED'
  | 'MEMBER_CHANGED'
  | 'READING_MADE'
  | 'SCREEN_PAIRED'
  | 'SCREEN_REVOKED'
  | 'API_KEY_MADE'
  | 'API_KEY_REVOKED'
  | 'PLAN_MADE';

export interface NewEvent {
  type: EventType;
  by: string | null;
  happenedAt: Date;
  recordedAt: Date;
  batchId?: string;
  orderId?: string;
  /** Ids, versions and values of the floor; never a name, an address or free text. */
  data: object;
}

/**
 * Appends an event and returns its number. The last statement of its transaction: the number is taken under the row lock
 * of the shop's counter, so the order of numbers is the order of commits, without holes.
 */
export async function appendEvent(
  tx: ShopTransaction,
  shopId: string,
  event: NewEvent,
): Promise<number> {
  const { rows } = await tx.execute<{ seq: number }>(sql`
    with counter as (update shop_counter set seq = seq + 1 where shop_id = ${shopId} returning seq)
    insert into event (shop_id, seq, type, by, happened_at, recorded_at, batch_id, order_id, data)
    select ${shopId}::uuid, seq, ${event.type}, ${event.by}::uuid, ${event.happenedAt.toISOString()}::timestamptz,
      ${event.recordedAt.toISOString()}::timestamptz, ${event.batchId ?? null}::uuid, ${event.orderId ?? null}::uuid,
      ${JSON.stringify(event.data)}::jsonb
    from counter returning seq`);
  const seq = rows[0]?.seq;
  if (seq === undefined) throw new Error('The shop has no counter.');
  return seq;
}
