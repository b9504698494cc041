import { index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { sql } from 'drizzle-orm';
import { instant } from './roles';

/* People and credentials belong to no shop. No door reads these tables; the entry functions do. */

export const person = pgTable(
  'person',
  {
    id: uuid('id').primaryKey(),
    email: text('email').notNull(),
    /** Argon2id in its own encoded form. */
    passwordHash: text('password_hash').notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (t) => [uniqueIndex('person_email').on(sql`lower(${t.email})`)],
).enableRLS();

/**
 * Attempts to sign in since the last one that worked, for every address that was tried, whether or not someone has it:
 * the delay must not tell which addresses are known.
 */
export const signInFailure = pgTable(
  'sign_in_failure',
  {
    /** SHA-256 of the address in lower case, as hex. */
    addressHash: text('address_hash').primaryKey(),
    failures: integer('failures').notNull(),
    notBefore: instant('not_before'),
    lastAt: instant('last_at').notNull(),
  },
  (t) => [index('sign_in_failure_last').on(t.lastAt)],
).enableRLS();

export const session = pgTable(
  'session',
  {
    id: uuid('id').primaryKey(),
    /** SHA-256 of the cookie's token, as hex. */
    tokenHash: text('token_hash').notNull().unique(),
    personId: uuid('person_id')
      .notNull()
      .references(() => person.id, { onDelete: 'cascade' }),
    /** The shop that the session looks at. */
    shopId: uuid('shop_id').notNull(),
    device: text('device').notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
    lastSeenAt: instant('last_seen_at').notNull().defaultNow(),
  },
  (t) => [index('session_person').on(t.personId)],
).enableRLS();

/** A display's wish to be paired. The shop is known only once an owner has entered the code. */
export const pairing = pgTable('pairing', {
  /** SHA-256 of the display's own secret, as hex. */
  secretHash: text('secret_hash').primaryKey(),
  code: text('code').notNull().unique(),
  expiresAt: instant('expires_at').notNull(),
  shopId: uuid('shop_id'),
  screenId: uuid('screen_id'),
  /** Set when the token was handed out: it is handed out once. */
  deliveredAt: instant('delivered_at'),
}).enableRLS();

/** Wrong pairing codes, to limit how many a member may try. */
export const pairingAttempt = pgTable(
  'pairing_attempt',
  {
    id: uuid('id').primaryKey().defaultRandom(),
    memberId: uuid('member_id').notNull(),
    at: instant('at').notNull().defaultNow(),
  },
  (t) => [index('pairing_attempt_member').on(t.memberId, t.at)],
).enableRLS();

/** Keys that sign tokens, encrypted with a key of the settings. */
export const signingKey = pgTable('signing_key', {
  id: text('id').primaryKey(),
  /** `<key id>:<nonce>:<ciphertext and tag>`, base64url. */
  sealed: text('sealed').notNull(),
  createdAt: instant('created_at').notNull().defaultNow(),
}).enableRLS();
