import { nameSchema } from '#shared/words/name-schema';
import * as z from 'zod';

export const LONGEST_CUSTOMER_NAME = 120;
export const LONGEST_EMAIL = 254;
export const LONGEST_REFERENCE = 80;
export const MOST_LINES = 50;
export const MOST_BOARDS = 500;

const COUNT = `Order whole boards, from 1 to ${MOST_BOARDS}.`;
const DAY = 'Choose a day that the calendar has, such as 2026-12-24.';

/** A text that may be left out; blank counts as left out. */
function optional(text: z.ZodString) {
  return z
    .string()
    .nullish()
    .transform((value) => value?.trim() || null)
    .pipe(text.nullable());
}

const line = z.object({
  designId: z.string('Choose a design.').min(1, 'Choose a design.').max(80, 'Choose a design.'),
  count: z.number(COUNT).int(COUNT).min(1, COUNT).max(MOST_BOARDS, COUNT),
});

/** An order as the API takes it. Every issue's path leads to the field, and its message is for a person. */
export const orderSchema = z.object({
  customerName: nameSchema('The customer’s name', LONGEST_CUSTOMER_NAME),
  customerEmail: optional(
    z
      .string()
      .max(LONGEST_EMAIL, `An e-mail address has ${LONGEST_EMAIL} characters at most.`)
      .regex(
        /^[^\s@]+@[^\s@.]+(\.[^\s@.]+)+$/,
        'This is not an e-mail address. Leave it empty if there is none.',
      ),
  ),
  clientReference: optional(
    z.string().max(LONGEST_REFERENCE, `A reference has ${LONGEST_REFERENCE} characters at most.`),
  ),
  dueDate: z.string('Choose the day the customer has it.').refine(isDay, DAY),
  lines: z
    .array(line, 'Add at least one line.')
    .min(1, 'Add at least one line.')
    .max(MOST_LINES, `An order has ${MOST_LINES} lines at most.`),
});

export type OrderDraft = z.input<typeof orderSchema>;
export type NewOrder = z.output<typeof orderSchema>;

function isDay(text: string): boolean {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(text)) return false;
  const day = new Date(`${text}T00:00:00Z`);
  return !Number.isNaN(day.getTime()) && day.toISOString().startsWith(text);
}
