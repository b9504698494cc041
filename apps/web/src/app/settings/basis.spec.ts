import { nextBasis } from './basis';

const clamps = (shop: { clamps: readonly number[] }) => shop.clamps;
const before = { version: 3, clamps: [1, 2], name: 'old' };

describe('nextBasis', () => {
  it('begins with the first shop that comes', () => {
    expect(nextBasis(undefined, before, clamps)).toBe(before);
  });

  it('moves the version on when another part changed', () => {
    const newer = { version: 4, clamps: [1, 2], name: 'new' };
    expect(nextBasis(before, newer, clamps)).toEqual({ ...before, version: 4 });
  });

  it('stays with the old version when its own part changed, so that saving is refused', () => {
    expect(nextBasis(before, { version: 4, clamps: [1], name: 'old' }, clamps)).toBe(before);
  });
});
