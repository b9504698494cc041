import {
  boolean,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import type { Role } from '#shared/members/permissions';
import type { HoursException, WeeklyHours } from '#shared/time/hours';
import { shopId, shopWall } from './roles';
import { shop } from './shop';

export const member = pgTable(
  'member',
  {
    shopId: shopId().references(() => shop.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    version: integer('version').notNull().default(1),
    /** Null for a member who cannot sign in by e-mail. */
    personId: uuid('person_id'),
    name: text('name').notNull(),
    initials: text('initials').notNull(),
    roles: text('roles').array().$type<Role[]>().notNull(),
    skills: text('skills').array().notNull(),
    /** Null: the shop's hours. */
    weekly: jsonb('weekly').$type<WeeklyHours>(),
    exceptions: jsonb('exceptions').$type<readonly HoursException[]>().notNull().default([]),
    active: boolean('active').notNull().default(true),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('member_person').on(t.personId),
    shopWall(),
  ],
);
