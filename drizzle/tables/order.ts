import {
  date,
  foreignKey,
  index,
  integer,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { batch } from './batch';
import { design } from './design';
import { instant, shopId, shopWall } from './roles';
import { shop } from './shop';

export const customer = pgTable(
  'customer',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    name: text('name').notNull(),
    email: text('email'),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.id] }), shopWall()],
);

export const shopOrder = pgTable(
  'shop_order',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    version: integer('version').notNull().default(1),
    code: text('code').notNull(),
    customerId: uuid('customer_id').notNull(),
    clientReference: text('client_reference'),
    dueDate: date('due_date', { mode: 'string' }).notNull(),
    shipBy: date('ship_by', { mode: 'string' }).notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('order_code').on(t.shopId, t.code),
    unique('order_client_reference').on(t.shopId, t.clientReference),
    foreignKey({
      columns: [t.shopId, t.customerId],
      foreignColumns: [customer.shopId, customer.id],
    }),
    index('order_due').on(t.shopId, t.dueDate, t.id),
    shopWall(),
  ],
);

export const orderLine = pgTable(
  'order_line',
  {
    shopId: shopId(),
    id: uuid('id').notNull(),
    orderId: uuid('order_id').notNull(),
    designId: uuid('design_id').notNull(),
    count: integer('count').notNull(),
    position: integer('position').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    foreignKey({
      columns: [t.shopId, t.orderId],
      foreignColumns: [shopOrder.shopId, shopOrder.id],
    }).onDelete('cascade'),
    foreignKey({ columns: [t.shopId, t.designId], foreignColumns: [design.shopId, design.id] }),
    index('order_line_order').on(t.shopId, t.orderId),
    shopWall(),
  ],
);

/** Which batches make a line, and how many of its boards. */
export const lineBatch = pgTable(
  'line_batch',
  {
    shopId: shopId(),
    lineId: uuid('line_id').notNull(),
    batchId: uuid('batch_id').notNull(),
    boards: integer('boards').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.lineId, t.batchId] }),
    foreignKey({
      columns: [t.shopId, t.lineId],
      foreignColumns: [orderLine.shopId, orderLine.id],
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.batchId],
      foreignColumns: [batch.shopId, batch.id],
    }).onDelete('cascade'),
    index('line_batch_batch').on(t.shopId, t.batchId),
    shopWall(),
  ],
);
