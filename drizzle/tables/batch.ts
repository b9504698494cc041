import { sql } from 'drizzle-orm';
import {
  type AnyPgColumn,
  boolean,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import type { RouteStep } from '#shared/route/route';
import { design } from './design';
import { member } from './member';
import { instant, shopId, shopWall } from './roles';
import { shop } from './shop';

/** A route as batches copied it: never changed, shared by batches whose copies are the same. */
export const routeCopy = pgTable(
  'route_copy',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    /** SHA-256 of the steps, as hex. */
    hash: text('hash').notNull(),
    steps: jsonb('steps').$type<readonly RouteStep[]>().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('route_copy_hash').on(t.shopId, t.hash),
    shopWall(),
  ],
);

export const batch = pgTable(
  'batch',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    version: integer('version').notNull().default(1),
    code: text('code').notNull(),
    designId: uuid('design_id').notNull(),
    routeId: uuid('route_id').notNull(),
    boards: integer('boards').notNull(),
    dueDate: date('due_date', { mode: 'string' }),
    shipBy: date('ship_by', { mode: 'string' }),
    releasedAt: instant('released_at'),
    shippedAt: instant('shipped_at'),
    assignedTo: uuid('assigned_to'),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('batch_code').on(t.shopId, t.code),
    foreignKey({ columns: [t.shopId, t.designId], foreignColumns: [design.shopId, design.id] }),
    foreignKey({
      columns: [t.shopId, t.routeId],
      foreignColumns: [routeCopy.shopId, routeCopy.id],
    }),
    foreignKey({ columns: [t.shopId, t.assignedTo], foreignColumns: [member.shopId, member.id] }),
    index('batch_open')
      .on(t.shopId)
      .where(sql`shipped_at is null`),
    shopWall(),
  ],
);

/** Rows of a batch go with it. */
const ofBatch = (t: { shopId: AnyPgColumn; batchId: AnyPgColumn }) =>
  foreignKey({
    columns: [t.shopId, t.batchId],
    foreignColumns: [batch.shopId, batch.id],
  }).onDelete('cascade');

export const stepRun = pgTable(
  'step_run',
  {
    shopId: shopId(),
    batchId: uuid('batch_id').notNull(),
    step: text('step').notNull(),
    piece: integer('piece').notNull(),
    startedAt: instant('started_at'),
    startedBy: uuid('started_by'),
    finishedAt: instant('finished_at'),
    finishedBy: uuid('finished_by'),
    cutAt: instant('cut_at'),
    cutBy: uuid('cut_by'),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.batchId, t.step, t.piece] }), ofBatch(t), shopWall()],
);

/** What a batch keeps or kept occupied, from `since` to `until`; open while `until` is null. */
export const occupation = pgTable(
  'occupation',
  {
    shopId: shopId(),
    batchId: uuid('batch_id').notNull(),
    resource: text('resource').notNull(),
    isClamps: boolean('is_clamps').notNull(),
    amount: integer('amount').notNull(),
    step: text('step').notNull(),
    piece: integer('piece').notNull(),
    since: instant('since').notNull(),
    until: instant('until'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.batchId, t.resource, t.step, t.piece, t.since] }),
    ofBatch(t),
    index('occupation_open')
      .on(t.shopId)
      .where(sql`until is null`),
    shopWall(),
  ],
);

/** A hold that was cut short. Rows stay for ever, also when the command is undone. */
export const holdOverride = pgTable(
  'hold_override',
  {
    shopId: shopId(),
    id: uuid('id').notNull(),
    batchId: uuid('batch_id').notNull(),
    step: text('step').notNull(),
    piece: integer('piece').notNull(),
    by: uuid('by').notNull(),
    at: instant('at').notNull(),
    reason: text('reason').notNull(),
    /** When an owner marked it as seen. */
    seenAt: instant('seen_at'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    ofBatch(t),
    index('hold_override_batch').on(t.shopId, t.batchId),
    shopWall(),
  ],
);

/** Why a batch was sent back: free text, kept out of the events. */
export const reworkReason = pgTable(
  'rework_reason',
  {
    shopId: shopId(),
    id: uuid('id').notNull(),
    batchId: uuid('batch_id').notNull(),
    reason: text('reason').notNull(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.id] }), ofBatch(t), shopWall()],
);

/** One finished piece, or one that will be. */
export const board = pgTable(
  'board',
  {
    shopId: shopId(),
    id: uuid('id').notNull(),
    batchId: uuid('batch_id').notNull(),
    serial: integer('serial').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('board_serial').on(t.shopId, t.serial),
    ofBatch(t),
    shopWall(),
  ],
);
