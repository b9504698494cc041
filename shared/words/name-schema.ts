import * as z from 'zod';

/**
 * A name as people type it: composed (NFC), spaces at its ends and doubled ones removed, from one character to `longest`.
 * `what` begins the sentence about it: "The shop's name".
 */
export function nameSchema(what: string, longest: number) {
  return z
    .string(`${what} is missing.`)
    .max(longest * 4, `${what} can have ${longest} characters at most.`)
    .transform((text) => text.normalize('NFC').replace(/\s+/gu, ' ').trim())
    .pipe(
      z
        .string()
        .min(1, `${what} is missing.`)
        .max(longest, `${what} can have ${longest} characters at most.`)
        .refine((text) => !/[\p{Cc}\p{Co}\p{Cs}]/u.test(text), {
          error: `${what} has characters in it that cannot be shown.`,
        }),
    );
}
