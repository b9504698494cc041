import * as z from 'zod';

const WRONG = 'This is no e-mail address. It has an @ in it, such as someone@example.com.';

/** An e-mail address, in lower case and without spaces around it. 254 characters is the most that mail carries (RFC 5321). */
export const emailSchema = z
  .string(WRONG)
  .max(300, WRONG)
  .transform((text) => text.trim().toLowerCase())
  .pipe(
    z
      .string()
      .max(254, WRONG)
      .regex(/^[^\s@\p{Cc}]{1,64}@[^\s@\p{Cc}]+\.[^\s@\p{Cc}.]+$/u, WRONG),
  );
