import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { arcsInside } from './ring-arcs';
import { SPECIES, SPECIES_KEYS, speciesName, speciesTone, UNKNOWN_TONE } from './species';
import { drawSwatch, swatchCells, SWATCH_SIZE } from './swatch';

const MM = 1_000_000n;
const DRIFT = [
  { species: 'maple', width: 30n * MM },
  { species: 'walnut', width: 20n * MM },
  { species: 'cherry', width: 50n * MM },
];

describe('swatchCells', () => {
  it('gives one cell for every strip of every slice', () => {
    expect(swatchCells(DRIFT, 5, 'drift')).toHaveLength(15);
  });

  it('turns every second slice end for end', () => {
    const cells = swatchCells(DRIFT, 2, 'drift');
    expect(cells.map((cell) => cell.species)).toEqual([
      ...['maple', 'walnut', 'cherry'],
      ...['cherry', 'walnut', 'maple'],
    ]);
    expect(cells[0]).toMatchObject({ x: 0, y: 0, width: 50, height: 30 });
    expect(cells[3]).toMatchObject({ x: 50, y: 0, height: 50 });
  });

  it('is the same for the same design and another for another', () => {
    expect(drawSwatch(DRIFT, 5, 'a')).toEqual(drawSwatch(DRIFT, 5, 'a'));
    expect(drawSwatch(DRIFT, 5, 'a').rings).not.toBe(drawSwatch(DRIFT, 5, 'b').rings);
  });

  it('covers the square exactly, and keeps the rings inside their cells', () => {
    const strip = fc.record({
      species: fc.constantFrom(...SPECIES_KEYS),
      width: fc.bigInt({ min: 1n, max: 200n * MM }),
    });
    const strips = fc.array(strip, { minLength: 1, maxLength: 40 });
    fc.assert(
      fc.property(strips, fc.integer({ min: 1, max: 60 }), fc.string(), (some, slices, seed) => {
        const cells = swatchCells(some, slices, seed);
        const area = cells.reduce((sum, cell) => sum + cell.width * cell.height, 0);
        expect(area).toBeCloseTo(SWATCH_SIZE * SWATCH_SIZE, 3);
        for (const cell of cells) {
          for (const arc of cell.arcs) {
            const middle = (arc.from + arc.to) / 2;
            const x = arc.cx + arc.radius * Math.cos(middle);
            const y = arc.cy + arc.radius * Math.sin(middle);
            expect(x).toBeGreaterThanOrEqual(cell.x - 1e-6);
            expect(x).toBeLessThanOrEqual(cell.x + cell.width + 1e-6);
            expect(y).toBeGreaterThanOrEqual(cell.y - 1e-6);
            expect(y).toBeLessThanOrEqual(cell.y + cell.height + 1e-6);
          }
        }
      }),
      { seed: 20261201, numRuns: 60 },
    );
  });

  it('draws nothing for a design without strips', () => {
    expect(drawSwatch([], 5, 'none')).toEqual({ fills: [], rings: '' });
    expect(drawSwatch([{ species: 'maple', width: 0n }], 5, 'none').fills).toEqual([]);
  });

  it('fills one path for each tone', () => {
    expect(drawSwatch(DRIFT, 4, 'drift').fills.map((fill) => fill.tone)).toEqual([
      SPECIES.maple.tone,
      SPECIES.walnut.tone,
      SPECIES.cherry.tone,
    ]);
  });
});

describe('arcsInside', () => {
  const square = { x: 0, y: 0, width: 10, height: 10 };

  it('keeps a circle that lies inside whole', () => {
    expect(arcsInside(square, 5, 5, 3)).toEqual([
      { cx: 5, cy: 5, radius: 3, from: 0, to: 2 * Math.PI },
    ]);
  });

  it('drops a circle that goes around or lies apart', () => {
    expect(arcsInside(square, 5, 5, 20)).toEqual([]);
    expect(arcsInside(square, 30, 30, 3)).toEqual([]);
  });

  it('cuts a quarter out of a circle around a corner', () => {
    const [arc, ...more] = arcsInside(square, 0, 0, 5);
    expect(more).toEqual([]);
    expect((arc?.to ?? 0) - (arc?.from ?? 0)).toBeCloseTo(Math.PI / 2, 6);
  });
});

describe('species', () => {
  it('has a tone and a name for each, and falls back for what it does not know', () => {
    for (const key of SPECIES_KEYS) expect(speciesTone(key)).toMatch(/^#[0-9a-f]{6}$/);
    expect(speciesTone('unobtainium')).toBe(UNKNOWN_TONE);
    expect(speciesName('unobtainium')).toBe('unobtainium');
    expect(speciesTone('toString')).toBe(UNKNOWN_TONE);
  });
});
