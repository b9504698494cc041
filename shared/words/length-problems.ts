import type { LengthProblem } from '#shared/length/length';

/** What to tell a person whose length could not be read. */
export function lengthSentence(problem: LengthProblem): string {
  switch (problem) {
    case 'EMPTY':
      return 'Enter a length, such as 600 mm or 23 5/8 in.';
    case 'NOT_A_LENGTH':
      return 'This is not a length. Write it as 600 mm, 23.5 mm or 3 5/16 in.';
    case 'UNKNOWN_UNIT':
      return 'This unit is not known. Use mm, cm, m or in.';
    case 'AMBIGUOUS_COMMA':
      return 'The comma could mean thousands or decimals. Write 1000 or 1.5.';
    case 'FRACTION_NEEDS_INCHES':
      return 'Fractions are for inches. Write in after it, or millimetres with a decimal point.';
    case 'NOT_A_RULE_FRACTION':
      return 'Fractions of an inch go by halves, quarters, 8ths, 16ths, 32nds and 64ths.';
    case 'TOO_FINE':
      return 'That is finer than a nanometre. Use fewer decimals.';
    case 'TOO_LONG':
      return 'That is longer than ten kilometres. Check the unit.';
  }
}
