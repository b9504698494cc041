import type { FloorBatch, PieceNeeds } from './model';
import type { StepScope } from '#shared/route/route';

/** How many panels are glued for a number of boards: whole groups of the design's panels. */
export function panelCountOf(needs: PieceNeeds, boards: number): number {
  return Math.ceil(boards / needs.panelBoards) * needs.panelCount;
}

/** How many blocks are glued for a number of boards. */
export function blockCountOf(needs: PieceNeeds, boards: number): number {
  return boards * needs.blocksPerBoard;
}

/** The piece numbers of a scope: [0] for the batch, 1..n for panels and blocks. */
export function piecesOf(batch: FloorBatch, scope: StepScope): number[] {
  switch (scope) {
    case 'BATCH':
      return [0];
    case 'PANEL':
      return countTo(panelCountOf(batch.needs, batch.boards));
    case 'BLOCK':
      return countTo(blockCountOf(batch.needs, batch.boards));
  }
}

/** The panels whose slices go into a block. */
export function panelsOfBlock(batch: FloorBatch, block: number): number[] {
  const { panelCount, panelBoards, blocksPerBoard } = batch.needs;
  const board = Math.floor((block - 1) / blocksPerBoard);
  const group = Math.floor(board / panelBoards);
  return countTo(panelCount).map((n) => group * panelCount + n);
}

/** The blocks that slices of a panel go into. */
export function blocksOfPanel(batch: FloorBatch, panel: number): number[] {
  return piecesOf(batch, 'BLOCK').filter((block) => panelsOfBlock(batch, block).includes(panel));
}

/** The pieces in scope `from` that a piece in scope `to` is made of, or is part of. */
export function relatedPieces(
  batch: FloorBatch,
  from: StepScope,
  to: StepScope,
  piece: number,
): number[] {
  if (from === to) return [piece];
  if (from === 'BATCH') return [0];
  if (to === 'BATCH') return piecesOf(batch, from);
  return from === 'PANEL' ? panelsOfBlock(batch, piece) : blocksOfPanel(batch, piece);
}

function countTo(n: number): number[] {
  return Array.from({ length: n }, (_, i) => i + 1);
}
