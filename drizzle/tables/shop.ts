import {
  bigint,
  boolean,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import type { HoursException, WeeklyHours } from '#shared/time/hours';
import type { Profile, RouteTemplate } from '#shared/route/template';
import type { StationUnit } from '#shared/floor/model';
import { instant, relayReads, shopId, shopWall } from './roles';

export const shop = pgTable(
  'shop',
  {
    id: uuid('id').primaryKey(),
    version: integer('version').notNull().default(1),
    name: text('name').notNull(),
    /** IANA. */
    zone: text('zone').notNull(),
    lengthUnit: text('length_unit').$type<'MILLIMETRE' | 'INCH'>().notNull().default('MILLIMETRE'),
    /** ISO 4217. */
    currency: text('currency').notNull().default('EUR'),
    weekly: jsonb('weekly').$type<WeeklyHours>().notNull(),
    exceptions: jsonb('exceptions').$type<readonly HoursException[]>().notNull().default([]),
    skills: jsonb('skills').$type<readonly string[]>().notNull(),
    route: jsonb('route').$type<RouteTemplate>().notNull(),
    /** Working days between ship-by and the due date: the carrier's transit, and packing. */
    transitDays: integer('transit_days').notNull().default(2),
    packingDays: integer('packing_days').notNull().default(1),
    batchPrefix: text('batch_prefix').notNull().default('CT'),
    /** When the demo was made; null for a real shop. */
    demoMadeAt: instant('demo_made_at'),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  () => [shopWall('id')],
);

/** Numbers that count per shop. `seq` is taken last in a transaction, so that its order is commit order. */
export const shopCounter = pgTable(
  'shop_counter',
  {
    shopId: uuid('shop_id')
      .primaryKey()
      .references(() => shop.id, { onDelete: 'cascade' }),
    seq: integer('seq').notNull().default(0),
    batchCode: integer('batch_code').notNull().default(0),
    orderCode: integer('order_code').notNull().default(1000),
    boardSerial: integer('board_serial').notNull().default(0),
  },
  () => [shopWall(), relayReads()],
);

export const station = pgTable(
  'station',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    key: text('key').notNull(),
    name: text('name').notNull(),
    unit: text('unit').$type<StationUnit>().notNull(),
    capacity: integer('capacity').notNull(),
    position: integer('position').notNull(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.key] }), shopWall()],
);

export const clampClass = pgTable(
  'clamp_class',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    key: text('key').notNull(),
    /** Nanometres. */
    length: bigint('length', { mode: 'bigint' }).notNull(),
    count: integer('count').notNull(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.key] }), shopWall()],
);

export const profile = pgTable(
  'profile',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    key: text('key').notNull(),
    kind: text('kind').$type<Profile['kind']>().notNull(),
    /** Whether new batches take it unless told otherwise. */
    usual: boolean('usual').notNull(),
    figures: jsonb('figures').$type<Profile>().notNull(),
  },
  (t) => [primaryKey({ columns: [t.shopId, t.key] }), shopWall()],
);
