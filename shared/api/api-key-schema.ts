import { nameSchema } from '#shared/words/name-schema';
import * as z from 'zod';

export const API_SCOPES = ['ORDERS_READ', 'CUSTOMERS_READ'] as const;
export const LONGEST_KEY_DAYS = 730;

const DAYS = `A key runs for 1 to ${LONGEST_KEY_DAYS} days, or has no end.`;

/** What an API key is made from. */
export const apiKeySchema = z.object({
  name: nameSchema("The key's name", 60),
  scopes: z
    .array(z.enum(API_SCOPES))
    .min(1, 'Choose at least one thing that the key may do.')
    .transform((scopes) => API_SCOPES.filter((scope) => scopes.includes(scope))),
  expiresInDays: z
    .number(DAYS)
    .int(DAYS)
    .min(1, DAYS)
    .max(LONGEST_KEY_DAYS, DAYS)
    .nullish()
    .transform((days) => days ?? null),
});
