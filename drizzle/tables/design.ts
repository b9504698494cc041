import {
  bigint,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { shopId, shopWall } from './roles';
import { shop } from './shop';

/** A strip's width is a decimal string of nanometres: JSON has no big integers. */
export interface StoredStrip {
  species: string;
  width: string;
}

const length = (name: string) => bigint(name, { mode: 'bigint' }).notNull();

export const design = pgTable(
  'design',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    version: integer('version').notNull().default(1),
    name: text('name').notNull(),
    length: length('length'),
    width: length('width'),
    thickness: length('thickness'),
    strips: jsonb('strips').$type<readonly StoredStrip[]>().notNull(),
    slices: integer('slices').notNull(),
    panelCount: integer('panel_count').notNull(),
    panelBoards: integer('panel_boards').notNull(),
    blocksPerBoard: integer('blocks_per_board').notNull(),
    panelClampCount: integer('panel_clamp_count').notNull(),
    panelClampLength: length('panel_clamp_length'),
    blockClampCount: integer('block_clamp_count').notNull(),
    blockClampLength: length('block_clamp_length'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('design_name').on(t.shopId, t.name),
    shopWall(),
  ],
);
