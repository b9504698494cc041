import { index, integer, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import { instant, shopId, shopWall } from './roles';
import { shop } from './shop';

/** A reading of the shop's air. */
export const reading = pgTable(
  'reading',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    at: instant('at').notNull(),
    /** Tenths of a degree Celsius. */
    temperatureTenthsC: integer('temperature_tenths_c').notNull(),
    humidityPercent: integer('humidity_percent'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('reading_at').on(t.shopId, t.at),
    shopWall(),
  ],
);
