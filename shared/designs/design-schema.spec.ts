import { describe, expect, it } from 'vitest';
import { designSchema, MOST_STRIPS, type DesignDraft } from './design-schema';

const MAPLE = { species: 'maple', width: '40000000' };
const DRIFT: DesignDraft = {
  name: 'Drift',
  length: '400000000',
  width: '280000000',
  thickness: '38000000',
  strips: [MAPLE, { species: 'walnut', width: '30000000' }],
  slices: 10,
  panelCount: 1,
  panelBoards: 4,
  blocksPerBoard: 1,
  panelClampCount: 6,
  blockClampCount: 4,
};

function issues(changes: object): string[] {
  const parsed = designSchema.safeParse({ ...DRIFT, ...changes });
  return parsed.success ? [] : parsed.error.issues.map((issue) => issue.path.join('.'));
}

describe('designSchema', () => {
  it('takes a design as it is and turns lengths into whole nanometres', () => {
    const taken = designSchema.parse({ ...DRIFT, name: '  Drift ' });
    expect(taken.name).toBe('Drift');
    expect(taken.length).toBe(400_000_000n);
    expect(taken.strips[1]).toEqual({ species: 'walnut', width: 30_000_000n });
  });

  it.each(['', '   ', 'x'.repeat(61), 'x'.repeat(10_000)])('refuses %s as a name', (name) => {
    expect(issues({ name })).toEqual(['name']);
  });

  it.each(['', '4e8', '-400000000', '400.5', '49999999', '1500000001', '9'.repeat(10_000)])(
    'refuses %s as a length',
    (length) => {
      expect(issues({ length })).toEqual(['length']);
    },
  );

  it('takes the thinnest and the thickest board, and no other beyond', () => {
    expect(issues({ thickness: '10000000' })).toEqual([]);
    expect(issues({ thickness: '150000000' })).toEqual([]);
    expect(issues({ thickness: '9999999' })).toEqual(['thickness']);
    expect(issues({ thickness: '150000001' })).toEqual(['thickness']);
  });

  it('leads to the strip that is wrong', () => {
    expect(issues({ strips: [MAPLE, { species: 'unobtainium', width: '40000000' }] })).toEqual([
      'strips.1.species',
    ]);
    expect(issues({ strips: [{ species: 'toString', width: '0' }] })).toEqual([
      'strips.0.species',
      'strips.0.width',
    ]);
  });

  it('refuses no strips and too many', () => {
    expect(issues({ strips: [] })).toEqual(['strips']);
    expect(issues({ strips: Array.from({ length: MOST_STRIPS + 1 }, () => MAPLE) })).toEqual([
      'strips',
    ]);
    expect(issues({ strips: Array.from({ length: MOST_STRIPS }, () => MAPLE) })).toEqual([]);
  });

  it.each([
    ['slices', 0, 61],
    ['panelCount', 0, 7],
    ['panelBoards', 0, 25],
    ['blocksPerBoard', 0, 5],
    ['panelClampCount', -1, 41],
    ['blockClampCount', -1, 41],
  ])('keeps %s between its bounds', (field, below, above) => {
    expect(issues({ [field]: below })).toEqual([field]);
    expect(issues({ [field]: above })).toEqual([field]);
    expect(issues({ [field]: below + 1 })).toEqual([]);
    expect(issues({ [field]: above - 1 })).toEqual([]);
    expect(issues({ [field]: 1.5 })).toEqual([field]);
    expect(issues({ [field]: Number.NaN })).toEqual([field]);
    expect(issues({ [field]: '2' })).toEqual([field]);
  });
});
