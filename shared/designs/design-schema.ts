import { isSpecies } from '#shared/designs/species';
import { MILLIMETRE } from '#shared/length/length';
import { nameSchema } from '#shared/words/name-schema';
import * as z from 'zod';

export const LONGEST_DESIGN_NAME = 60;
export const MOST_STRIPS = 40;
export const MOST_SLICES = 60;

/** A length as the API takes it, nanometres as a decimal string, between two bounds. */
function length(shortest: bigint, longest: bigint, range: string) {
  return z
    .string(range)
    .regex(/^\d{1,15}$/, range)
    .transform((digits) => BigInt(digits))
    .refine((value) => value >= shortest && value <= longest, range);
}

/** A whole number between two bounds. */
function count(fewest: number, most: number, range: string) {
  return z.number(range).int(range).min(fewest, range).max(most, range);
}

const SIDE = 'A board is 50 mm (about 2 in) at least and 1.5 m (about 59 in) at most.';
const THICKNESS = 'A board is 10 mm (about 3/8 in) thick at least and 150 mm (about 6 in) at most.';
const WIDTH = 'A strip is 1 mm (about 3/64 in) wide at least and 500 mm (about 20 in) at most.';
const CLAMPS = 'Count whole clamps, from 0 to 40.';

const strip = z.object({
  species: z.string('Choose a wood.').refine(isSpecies, 'Choose one of the woods of the list.'),
  width: length(MILLIMETRE, 500n * MILLIMETRE, WIDTH),
});

/** A design as the API takes it. Every issue's path leads to the field, and its message is for a person. */
export const designSchema = z.object({
  name: nameSchema('The design’s name', LONGEST_DESIGN_NAME),
  length: length(50n * MILLIMETRE, 1_500n * MILLIMETRE, SIDE),
  width: length(50n * MILLIMETRE, 1_500n * MILLIMETRE, SIDE),
  thickness: length(10n * MILLIMETRE, 150n * MILLIMETRE, THICKNESS),
  strips: z
    .array(strip, 'Add at least one strip.')
    .min(1, 'Add at least one strip.')
    .max(MOST_STRIPS, `A slice has ${MOST_STRIPS} strips at most.`),
  slices: count(1, MOST_SLICES, `A board has 1 to ${MOST_SLICES} slices.`),
  panelCount: count(1, 6, 'A group of boards comes from 1 to 6 panels.'),
  panelBoards: count(1, 24, 'A group of panels gives 1 to 24 boards.'),
  blocksPerBoard: count(1, 4, 'A board is made of 1 to 4 blocks.'),
  panelClampCount: count(0, 40, CLAMPS),
  blockClampCount: count(0, 40, CLAMPS),
});

export type DesignDraft = z.input<typeof designSchema>;
export type NewDesign = z.output<typeof designSchema>;
