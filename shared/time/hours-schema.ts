import * as z from 'zod';
import { isLocalDate } from './zone';

const MINUTES_OF_A_DAY = 24 * 60;

const minuteSchema = z
  .number('Give a time of day, like 07:30.')
  .int('Times are to the minute.')
  .min(0, 'A day begins at 00:00.')
  .max(MINUTES_OF_A_DAY, 'A day ends at 24:00.');

const spanSchema = z
  .object({ from: minuteSchema, to: minuteSchema })
  .refine((span) => span.from < span.to, 'Work must end after it begins, on the same day.');

/** Spans of one day: in order, none over another, six at most. */
export const spansSchema = z
  .array(spanSchema)
  .max(6, 'A day has six spans at most.')
  .refine(
    (spans) => spans.every((span, i) => i === 0 || (spans[i - 1]?.to ?? 0) <= span.from),
    'The spans of a day must follow one another without overlapping.',
  );

/** Seven days, Monday first. */
export const weeklySchema = z.array(spansSchema).length(7, 'A week has seven days.');

export const exceptionsSchema = z
  .array(
    z.object({
      date: z.string('This is not a date.').refine(isLocalDate, 'This is not a date.'),
      spans: spansSchema,
      reason: z.string().trim().max(60, 'Keep the reason under 60 characters.').optional(),
    }),
  )
  .max(400, 'There can be 400 exceptions at most.')
  .refine(
    (exceptions) => new Set(exceptions.map((one) => one.date)).size === exceptions.length,
    'A date can have one exception only.',
  );

/** The hours form, checked on both sides. */
export const hoursSchema = z.object({ weekly: weeklySchema, exceptions: exceptionsSchema });
