import { describe, expect, it } from 'vitest';
import { clampChanges } from './clamp-changes';

const MM = 1_000_000n;
const CURRENT = [
  { key: 'c600', length: 600n * MM, count: 12 },
  { key: 'c900', length: 900n * MM, count: 6 },
];
const NONE = new Map<string, number>();

function fields(wanted: Parameters<typeof clampChanges>[1], inUse: ReadonlyMap<string, number>) {
  const changes = clampChanges(CURRENT, wanted, inUse);
  return changes.ok ? null : changes.problems.map(({ code, field }) => [code, field]);
}

describe('clampChanges', () => {
  it('keeps, adds and removes classes', () => {
    const wanted = [
      { key: 'c600', length: 650n * MM, count: 3 },
      { key: null, length: 1_200n * MM, count: 4 },
    ];
    expect(clampChanges(CURRENT, wanted, NONE)).toEqual({
      ok: true,
      keep: [{ key: 'c600', length: 650n * MM, count: 3 }],
      add: [{ key: 'c1200', length: 1_200n * MM, count: 4 }],
      remove: ['c900'],
    });
  });

  it('gives a new class a key that no other has or had until now', () => {
    const wanted = [
      { key: 'c600', length: 650n * MM, count: 3 },
      { key: null, length: 600n * MM, count: 4 },
      { key: null, length: 600n * MM + 1n, count: 4 },
    ];
    const changes = clampChanges(CURRENT, wanted, NONE);
    expect(changes.ok && changes.add.map((each) => each.key)).toEqual(['c600-2', 'c600-3']);
  });

  it('leaves what is in use as it is', () => {
    const inUse = new Map([
      ['c600', 4],
      ['c900', 1],
    ]);
    expect(fields([{ key: 'c600', length: 600n * MM, count: 3 }], inUse)).toEqual([
      ['CLAMPS_IN_USE', 'clamps.0.count'],
      ['CLAMPS_IN_USE', 'clamps'],
    ]);
    const longer = { key: 'c900', length: 950n * MM, count: 1 };
    expect(fields([{ key: 'c600', length: 600n * MM, count: 4 }, longer], inUse)).toEqual([
      ['CLAMPS_IN_USE', 'clamps.1.length'],
    ]);
  });

  it('does not know a class that is not there', () => {
    const wanted = [...CURRENT, { key: 'c700', length: 700n * MM, count: 1 }];
    expect(fields(wanted, NONE)).toEqual([['NOT_FOUND', 'clamps.2.key']]);
  });
});
