import { sql } from 'drizzle-orm';
import { pgPolicy, pgRole, uuid, timestamp } from 'drizzle-orm/pg-core';

/*
 * The four doors of the database. None owns a table or passes by row-level security; server/db/doors.ts opens them.
 */

/** Reads and writes the rows of one shop, the one set for the transaction. */
export const shopDoor = pgRole('clamptide_shop').existing();
/** Turns a hash into a person and a shop through functions; sees no table. */
export const entryDoor = pgRole('clamptide_entry').existing();
/** Reads the events of all shops and keeps its own cursors. */
export const relayDoor = pgRole('clamptide_relay').existing();
/** Owns the job queue's schema and nothing else. */
export const workDoor = pgRole('clamptide_work').existing();

/** The wall: only rows of the transaction's shop. Null, and so no row at all, when no shop is set. */
export const shopWall = (column = 'shop_id') =>
  pgPolicy('shop_wall', {
    for: 'all',
    to: shopDoor,
    using: sql.raw(`${column} = (select current_shop())`),
    withCheck: sql.raw(`${column} = (select current_shop())`),
  });

/** The relay reads past the wall. */
export const relayReads = () =>
  pgPolicy('relay_reads', { for: 'select', to: relayDoor, using: sql`true` });

export const shopId = () => uuid('shop_id').notNull();
export const instant = (name: string) =>
  timestamp(name, { withTimezone: true, precision: 3, mode: 'date' });
