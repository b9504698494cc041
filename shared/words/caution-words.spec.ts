import { describe, expect, it } from 'vitest';
import { cautionOf } from '#shared/floor/override';
import { HOLD_KINDS, type CautionCode } from '#shared/route/route';
import { CAUTION_ENDING, cautionLine, cautionWords } from './caution-words';

// The compiler asks for every code here.
const all: Record<CautionCode, RegExp> = {
  PLANER: /thrown back/,
  TABLE_SAW: /Guard/,
  END_GRAIN_PLANER: /End grain/,
  SLICING: /edges/,
  DUST: /extraction/,
  OILY_RAGS: /burn/,
  UNCURED_GLUE: /cured/,
  FOOD_CONTACT: /food/,
};
const codes = Object.keys(all) as CautionCode[];

describe('cautions', () => {
  it.each(codes)('%s names the danger in a line and defers to those who know', (code) => {
    expect(cautionLine(code)).toMatch(all[code]);
    expect(cautionLine(code).length).toBeLessThanOrEqual(125);
    expect(cautionWords(code)).toBe(`${cautionLine(code)} ${CAUTION_ENDING}`);
  });

  it('end alike', () => {
    for (const first of ['manual', 'data sheet', 'local rules', 'qualified person']) {
      expect(CAUTION_ENDING).toContain(first);
    }
  });

  it('are there for every hold that can be overridden', () => {
    for (const kind of HOLD_KINDS) expect(codes).toContain(cautionOf(kind));
    expect(cautionOf('CURE')).toBe('UNCURED_GLUE');
    expect(cautionOf('FINISH_CURE')).toBe('FOOD_CONTACT');
  });
});
