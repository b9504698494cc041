/**
 * The woods a strip can be of. Tones are drawings of the wood, chosen for the swatch, not measurements; `openPored` says
 * whether the pores of the end grain stay open enough to take up water and food (from memory, common practice).
 */
export const SPECIES = {
  maple: { name: 'maple', tone: '#e6cda3', openPored: false },
  walnut: { name: 'walnut', tone: '#5b3a26', openPored: false },
  cherry: { name: 'cherry', tone: '#a9603a', openPored: false },
  ash: { name: 'ash', tone: '#d9c3a0', openPored: true },
  hickory: { name: 'hickory', tone: '#c79a6a', openPored: true },
  beech: { name: 'beech', tone: '#d2a679', openPored: false },
  birch: { name: 'birch', tone: '#e3c9a4', openPored: false },
  oak: { name: 'oak', tone: '#bd9360', openPored: true },
  elm: { name: 'elm', tone: '#a67c52', openPored: true },
  pear: { name: 'pear', tone: '#cb9275', openPored: false },
  plum: { name: 'plum', tone: '#8d4f3d', openPored: false },
  hornbeam: { name: 'hornbeam', tone: '#dfd0b3', openPored: false },
  robinia: { name: 'robinia', tone: '#a98a4b', openPored: true },
} as const satisfies Record<string, { name: string; tone: string; openPored: boolean }>;

export type SpeciesKey = keyof typeof SPECIES;

export const SPECIES_KEYS = Object.keys(SPECIES) as readonly SpeciesKey[];

/** The tone of a wood this version does not know: a plain mid-brown. */
export const UNKNOWN_TONE = '#b08d66';

export function isSpecies(key: string): key is SpeciesKey {
  return Object.hasOwn(SPECIES, key);
}

/** The tone a species is drawn in, `#rrggbb`. */
export function speciesTone(key: string): string {
  return isSpecies(key) ? SPECIES[key].tone : UNKNOWN_TONE;
}

/** The species' name as in "walnut"; the key itself when it is not known. */
export function speciesName(key: string): string {
  return isSpecies(key) ? SPECIES[key].name : key;
}
