import type { FinishProfile, GlueProfile } from './template';

/*
 * Profiles a new shop starts with. Times are common practice (no source) on the safe side: glue dries overnight before
 * machining; oil soaks about an hour, is wiped, and the next coat goes on 24 hours later. The data sheet comes first.
 */

const note = 'Default figures on the safe side. The data sheet of the product you use comes first.';

export const DEFAULT_GLUES: readonly GlueProfile[] = [
  {
    key: 'd3-pva',
    kind: 'GLUE',
    name: 'D3 white glue',
    isDefault: true,
    note,
    openMinutes: 8,
    clampedMinutes: 60,
    machiningMinutes: 12 * 60,
    lowestTenthsC: 100,
    referenceTenthsC: 200,
    spreadGramsPerSquareMetre: 180,
    pressureKilopascal: 1000,
  },
  {
    key: 'd4-pva',
    kind: 'GLUE',
    name: 'D4 white glue',
    isDefault: true,
    note,
    openMinutes: 6,
    clampedMinutes: 90,
    machiningMinutes: 16 * 60,
    lowestTenthsC: 100,
    referenceTenthsC: 200,
    spreadGramsPerSquareMetre: 180,
    pressureKilopascal: 1000,
  },
];

export const DEFAULT_FINISHES: readonly FinishProfile[] = [
  {
    key: 'mineral-oil',
    kind: 'FINISH',
    name: 'food-grade mineral oil',
    isDefault: true,
    note,
    drying: false,
    soakMinutes: 60,
    wipeByMinutes: null,
    dwellMinutes: 24 * 60,
    coats: 2,
    fullCureMinutes: 0,
    referenceTenthsC: 200,
  },
  {
    key: 'drying-oil',
    kind: 'FINISH',
    name: 'hardening oil',
    isDefault: true,
    note: `${note} A hardening oil is fit for food only after its full cure.`,
    drying: true,
    soakMinutes: 20,
    wipeByMinutes: 45,
    dwellMinutes: 24 * 60,
    coats: 2,
    fullCureMinutes: 14 * 24 * 60,
    referenceTenthsC: 200,
  },
];
