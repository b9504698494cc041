import { index, jsonb, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { instant, shopId, shopWall } from './roles';
import { shop } from './shop';

/** A display that was paired. Its token names it; the token itself is stored nowhere. */
export const screen = pgTable(
  'screen',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    name: text('name').notNull(),
    pairedAt: instant('paired_at').notNull().defaultNow(),
    lastSeenAt: instant('last_seen_at'),
    revokedAt: instant('revoked_at'),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.id] }), index('screen_id').on(t.id), shopWall()],
);

export type ApiScope = 'ORDERS_READ' | 'CUSTOMERS_READ';

export const apiKey = pgTable(
  'api_key',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    name: text('name').notNull(),
    prefix: text('prefix').notNull(),
    lastFour: text('last_four').notNull(),
    /** SHA-256 of the key, as hex. */
    keyHash: text('key_hash').notNull().unique(),
    scopes: text('scopes').array().$type<ApiScope[]>().notNull(),
    createdBy: uuid('created_by').notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
    expiresAt: instant('expires_at'),
    lastUsedAt: instant('last_used_at'),
    revokedAt: instant('revoked_at'),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.id] }), shopWall()],
);

/** What a repeated call gets: the answer's id, kept for a day with the hash of what was asked. */
export const idempotencyKey = pgTable(
  'idempotency_key',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    /** The member or client, so that two never meet in one key. */
    caller: uuid('caller').notNull(),
    operation: text('operation').notNull(),
    key: text('key').notNull(),
    requestHash: text('request_hash').notNull(),
    result: jsonb('result').$type<{ id: string }>().notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (t) => [unique('idempotency_key_once').on(t.shopId, t.caller, t.operation, t.key), shopWall()],
);
