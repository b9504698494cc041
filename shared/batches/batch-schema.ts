import { isLocalDate } from '#shared/time/zone';
import * as z from 'zod';

export const MOST_BOARDS = 200;
export const LONGEST_KEY = 80;

const BOARDS_RANGE = `Make whole boards, from 1 to ${MOST_BOARDS}.`;
const NOT_A_DATE = 'Enter a date that is in the calendar, as 2026-12-01.';
const KEY_RANGE = `The key has 1 to ${LONGEST_KEY} characters.`;

/** A local calendar date, 2026-12-01, that exists. */
const calendarDate = z.string(NOT_A_DATE).refine(isLocalDate, NOT_A_DATE);

/** What a new batch is made of, beside its design. Every issue's path leads to the field, its message is for a person. */
export const batchSchema = z.object({
  boards: z
    .number(BOARDS_RANGE)
    .int(BOARDS_RANGE)
    .min(1, BOARDS_RANGE)
    .max(MOST_BOARDS, BOARDS_RANGE),
  /** The day the customer has it; null for stock. */
  dueDate: calendarDate.nullable(),
  idempotencyKey: z.string(KEY_RANGE).min(1, KEY_RANGE).max(LONGEST_KEY, KEY_RANGE).nullable(),
});

/** The same for a shop whose calendar shows `today`: a due date in the past is refused. */
export function batchSchemaOn(today: string) {
  return batchSchema.refine((batch) => batch.dueDate === null || batch.dueDate >= today, {
    path: ['dueDate'],
    message: 'The due date is in the past.',
  });
}

export type NewBatch = z.output<typeof batchSchema>;
