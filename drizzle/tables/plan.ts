import { foreignKey, integer, jsonb, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import { batch } from './batch';
import { instant, shopId, shopWall } from './roles';
import { shop } from './shop';

/** A planned step; instants are milliseconds since the epoch. */
export interface StoredPlanStep {
  batchId: string;
  step: string;
  piece: number;
  startAt: number;
  endAt: number;
  members: string[];
  reason: string | null;
}

export const plan = pgTable(
  'plan',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    version: integer('version').notNull(),
    madeAt: instant('made_at').notNull(),
    /** The event up to which the floor is in it. */
    seq: integer('seq').notNull(),
    steps: jsonb('steps').$type<readonly StoredPlanStep[]>().notNull(),
    unplanned: jsonb('unplanned').$type<readonly { batchId: string; reason: string }[]>().notNull(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.version] }), shopWall()],
);

export const forecast = pgTable(
  'forecast',
  {
    shopId: shopId(),
    batchId: uuid('batch_id').notNull(),
    planVersion: integer('plan_version').notNull(),
    readyAt: instant('ready_at').notNull(),
    nextStartAt: instant('next_start_at'),
    slackMinutes: integer('slack_minutes'),
    slackDays: integer('slack_days'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.batchId] }),
    foreignKey({
      columns: [t.shopId, t.batchId],
      foreignColumns: [batch.shopId, batch.id],
    }).onDelete('cascade'),
    shopWall(),
  ],
);
