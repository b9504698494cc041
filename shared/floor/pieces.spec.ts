import { describe, expect, it } from 'vitest';
import { aBatch } from '#test/factories/floor';
import {
  blockCountOf,
  blocksOfPanel,
  panelCountOf,
  panelsOfBlock,
  piecesOf,
  relatedPieces,
} from './pieces';

const needs = aBatch().needs;

describe('panels and blocks', () => {
  it.each([
    [{ panelCount: 1, panelBoards: 2 }, 4, 2],
    [{ panelCount: 1, panelBoards: 2 }, 5, 3],
    [{ panelCount: 3, panelBoards: 4 }, 4, 3],
    [{ panelCount: 3, panelBoards: 4 }, 5, 6],
    [{ panelCount: 1, panelBoards: 12 }, 1, 1],
  ])('%o for %i boards are %i panels', (more, boards, panels) => {
    expect(panelCountOf({ ...needs, ...more }, boards)).toBe(panels);
  });

  it('are counted from 1, and the batch is piece 0', () => {
    const batch = aBatch({ boards: 5 });
    expect(piecesOf(batch, 'BATCH')).toEqual([0]);
    expect(piecesOf(batch, 'PANEL')).toEqual([1, 2, 3]);
    expect(piecesOf(batch, 'BLOCK')).toEqual([1, 2, 3, 4, 5]);
    expect(blockCountOf({ ...needs, blocksPerBoard: 2 }, 5)).toBe(10);
  });

  it('a block is cut from all panels of its group', () => {
    const batch = aBatch({
      boards: 5,
      needs: { ...needs, panelCount: 2, panelBoards: 2, blocksPerBoard: 2 },
    });
    // Two boards, four blocks a group of two panels.
    expect([1, 4, 5, 8, 9, 10].map((block) => panelsOfBlock(batch, block))).toEqual([
      [1, 2],
      [1, 2],
      [3, 4],
      [3, 4],
      [5, 6],
      [5, 6],
    ]);
    expect(blocksOfPanel(batch, 4)).toEqual([5, 6, 7, 8]);
    expect(blocksOfPanel(batch, 6)).toEqual([9, 10]);
    const blocks = piecesOf(batch, 'PANEL').flatMap((panel) => blocksOfPanel(batch, panel));
    expect(new Set(blocks).size).toBe(10);
  });

  it('relate to each other and to the batch', () => {
    const batch = aBatch();
    expect(relatedPieces(batch, 'PANEL', 'PANEL', 2)).toEqual([2]);
    expect(relatedPieces(batch, 'BATCH', 'BLOCK', 3)).toEqual([0]);
    expect(relatedPieces(batch, 'PANEL', 'BATCH', 0)).toEqual([1, 2]);
    expect(relatedPieces(batch, 'PANEL', 'BLOCK', 3)).toEqual([2]);
    expect(relatedPieces(batch, 'BLOCK', 'PANEL', 2)).toEqual([3, 4]);
  });
});
