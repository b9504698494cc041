import { MILLIMETRE } from '#shared/length/length';
import * as z from 'zod';

export const MOST_CLASSES = 20;
export const MOST_CLAMPS = 500;
export const SHORTEST_CLAMP = 50n * MILLIMETRE;
export const LONGEST_CLAMP = 3_000n * MILLIMETRE;

const LENGTH_RANGE = 'A clamp closes on 50 mm at least and 3 m (about 118 in) at most.';
const COUNT_RANGE = 'Count whole clamps, from 0 to 500.';

/** One length class as the API takes it: the length in nanometres, as a decimal string. */
const clampClass = z.object({
  /** The key of a class that is there already; null for a new one. */
  key: z
    .string()
    .max(40, 'This class is not known. Read the page again.')
    .nullish()
    .transform((key) => key ?? null),
  length: z
    .string()
    .regex(/^\d{1,15}$/, LENGTH_RANGE)
    .transform((digits) => BigInt(digits))
    .refine((length) => length >= SHORTEST_CLAMP && length <= LONGEST_CLAMP, LENGTH_RANGE),
  count: z.number(COUNT_RANGE).int(COUNT_RANGE).min(0, COUNT_RANGE).max(MOST_CLAMPS, COUNT_RANGE),
});

/** The shop's clamps, all of them. Every issue's path leads to the field, and its message is for a person. */
export const clampsSchema = z
  .array(clampClass)
  .min(1, 'Keep at least one length. Set its count to 0 when the shop has none.')
  .max(MOST_CLASSES, `There can be ${MOST_CLASSES} lengths at most.`)
  .superRefine((classes, context) => {
    twice(classes.map((each) => each.length)).forEach((index) => {
      context.addIssue({
        code: 'custom',
        path: [index, 'length'],
        message: 'This length is there already. Add its clamps to the other line.',
      });
    });
    twice(classes.map((each) => each.key)).forEach((index) => {
      context.addIssue({
        code: 'custom',
        path: [index, 'key'],
        message: 'Two lines stand for the same clamps. Read the page again.',
      });
    });
  });

export type ClampsInput = z.input<typeof clampsSchema>;
export type Clamps = z.output<typeof clampsSchema>;

/** Where a value stands that was there before; null never counts. */
function twice(values: readonly (bigint | string | null)[]): number[] {
  return values.flatMap((value, index) =>
    value !== null && values.indexOf(value) < index ? [index] : [],
  );
}
