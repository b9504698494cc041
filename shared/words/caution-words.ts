import type { CautionCode } from '#shared/route/route';

/** Comes after every caution: the product does not know your machine. */
export const CAUTION_ENDING =
  'The machine’s manual, the product’s data sheet, local rules and a qualified person come first.';

/** The caution in a line, for where the work is. */
export function cautionLine(code: CautionCode): string {
  switch (code) {
    case 'PLANER':
      return 'Short or loose pieces can be thrown back. Stand aside.';
    case 'TABLE_SAW':
      return 'Guard and riving knife on; push stick for narrow strips.';
    case 'END_GRAIN_PLANER':
      return 'End grain in a planer can break up and be thrown. Light passes, backed edges, stand aside.';
    case 'SLICING':
      return 'Narrow slices: support both sides, never reach over the blade. Fresh edges are sharp.';
    case 'DUST':
      return 'Fine dust harms lungs: extraction on, mask on. Some woods irritate.';
    case 'OILY_RAGS':
      return 'Oily rags can heat by themselves and burn. Spread them flat outdoors or keep them in a closed metal can with water.';
    case 'UNCURED_GLUE':
      return 'A joint that has not cured can open in the machine and throw pieces.';
    case 'FOOD_CONTACT':
      return 'Boards touch food: only a finish fit for it, and only after its waiting is done.';
  }
}

/** The caution in full. */
export function cautionWords(code: CautionCode): string {
  return `${cautionLine(code)} ${CAUTION_ENDING}`;
}
