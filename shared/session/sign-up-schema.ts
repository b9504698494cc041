import { isZone } from '#shared/time/zone';
import { nameSchema } from '#shared/words/name-schema';
import * as z from 'zod';
import { isCommonPassword } from './common-passwords';
import { emailSchema } from './email-schema';

export const SHORTEST_PASSWORD = 8;
export const LONGEST_PASSWORD = 256;

/** A password as it is typed: nothing is trimmed. */
export const passwordSchema = z
  .string(`Use at least ${SHORTEST_PASSWORD} characters.`)
  .min(SHORTEST_PASSWORD, `Use at least ${SHORTEST_PASSWORD} characters.`)
  .max(LONGEST_PASSWORD, `Use ${LONGEST_PASSWORD} characters at most.`)
  .refine((password) => !isCommonPassword(password), {
    error: 'This password is among the first that anyone would try. Choose another.',
  });

const ZONE_WRONG = 'Choose the time zone of the shop, such as Europe/Vienna.';

/** What makes a shop and its owner. Every message is for a person. */
export const signUpSchema = z.object({
  shopName: nameSchema("The shop's name", 80),
  zone: z.string(ZONE_WRONG).max(64, ZONE_WRONG).refine(isNamedZone, ZONE_WRONG),
  name: nameSchema('Your name', 80),
  email: emailSchema,
  password: passwordSchema,
});

export type SignUp = z.output<typeof signUpSchema>;

/** A zone with a name: an offset such as +02:00 knows no daylight-saving time. */
function isNamedZone(text: string): boolean {
  return /^[A-Za-z]/.test(text) && isZone(text);
}
