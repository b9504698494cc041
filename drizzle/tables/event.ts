import { sql } from 'drizzle-orm';
import {
  index,
  integer,
  jsonb,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import { instant, relayDoor, relayReads, shopId, shopWall } from './roles';

/**
 * Facts, numbered per shop without holes in the order of their commits. Never updated: a mistake is mended by another
 * event. They hold ids, versions and values of the floor, never names, addresses or free text.
 */
export const event = pgTable(
  'event',
  {
    shopId: shopId(),
    seq: integer('seq').notNull(),
    type: text('type').notNull(),
    /** The member who did it; null when the product, a client or a screen did. */
    by: uuid('by'),
    happenedAt: instant('happened_at').notNull(),
    recordedAt: instant('recorded_at').notNull(),
    batchId: uuid('batch_id'),
    orderId: uuid('order_id'),
    data: jsonb('data').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.seq] }),
    index('event_batch').on(t.shopId, t.batchId, t.seq),
    shopWall(),
    relayReads(),
  ],
);

/** How far the relay has turned a shop's events into jobs. */
export const relayCursor = pgTable(
  'relay_cursor',
  {
    shopId: uuid('shop_id').primaryKey(),
    seq: integer('seq').notNull(),
  },
  () => [
    pgPolicy('relay_keeps', {
      for: 'all',
      to: relayDoor,
      using: sql`true`,
      withCheck: sql`true`,
    }),
  ],
);
