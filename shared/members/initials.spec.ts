import { describe, expect, it } from 'vitest';
import { initialsOf } from './initials';

describe('initialsOf', () => {
  it.each([
    ['Ines Rothe', 'IR'],
    ['Olle', 'OL'],
    ['Ana Maria da Silva', 'AMD'],
    ['Åsa Öberg', 'ÅÖ'],
    ['jean-luc', 'JL'],
    ['  x ', 'X'],
    ['!!!', '?'],
  ])('makes %j to %s', (name, initials) => {
    expect(initialsOf(name)).toBe(initials);
  });
});
