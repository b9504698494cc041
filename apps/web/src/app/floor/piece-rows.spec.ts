import type { FloorBatch } from '#shared/floor/model';
import { apiBatch, apiFloor, NOW, ripped, run } from './floor-fixture';
import { toBoardBatch, toSurroundings } from './floor-view';
import { pieceRows } from './piece-rows';

const now = Date.parse(NOW);
const around = toSurroundings(apiFloor());
const floor = (...runs: ReturnType<typeof run>[]): FloorBatch => {
  const batch = toBoardBatch(apiBatch({ boards: 8, runs }), around);
  if (!batch) throw new Error('The fixture has no such route or design.');
  return batch.floor;
};
const states = (batch: FloorBatch, scope: 'BATCH' | 'PANEL' | 'BLOCK', piece: number) =>
  Object.fromEntries(
    pieceRows(batch, scope, now)
      .find((row) => row.piece === piece)
      ?.cells.map((cell) => [cell.step.key, cell.state.kind]) ?? [],
  );

describe('pieceRows', () => {
  it('has a row for each piece of a scope', () => {
    const batch = floor();
    const pieces = (scope: 'BATCH' | 'PANEL' | 'BLOCK') =>
      pieceRows(batch, scope, now).map((row) => row.piece);
    expect(pieces('BATCH')).toEqual([0]);
    expect(pieces('PANEL')).toEqual([1, 2]);
    expect(pieces('BLOCK')).toHaveLength(8);
  });

  it('shows how far each piece is', () => {
    const batch = floor(...ripped(300), run('glue-1', 1, -50, -30), run('glue-1', 2, -5));
    expect(states(batch, 'PANEL', 1)).toEqual({
      'fresh-faces-1': 'CLEAR',
      'glue-1': 'DONE',
      'clamped-1': 'HOLDING',
      'unclamp-1': 'TODO',
      'cure-1': 'HOLDING',
      'flatten-1': 'TODO',
      slice: 'TODO',
    });
    expect(states(batch, 'PANEL', 2)).toMatchObject({ 'glue-1': 'WORKING', 'clamped-1': 'TODO' });
    expect(states(batch, 'BATCH', 0)).toMatchObject({ mill: 'DONE', 'flatten-2': 'TODO' });
  });

  it('tells a maximum that still counts from one that was kept or missed', () => {
    const state = (ago: number) =>
      pieceRows(floor(...ripped(ago), run('glue-1', 1, -3)), 'PANEL', now).map(
        (row) => row.cells[0]?.state,
      );
    expect(state(60)).toMatchObject([
      { kind: 'CLEAR' },
      { kind: 'LIMIT', latestAt: now + 23 * 3_600_000, isMissed: false },
    ]);
    expect(state(25 * 60)[1]).toMatchObject({ kind: 'LIMIT', isMissed: true });
  });

  it('shows what could start now and what was cut short', () => {
    const cut = { ...run('clamped-1', 1, null), cutAt: NOW, cutBy: 'm1' };
    const batch = floor(...ripped(300), run('glue-1', 1, -50, -30), cut);
    expect(states(batch, 'PANEL', 1)).toMatchObject({
      'clamped-1': 'CUT',
      'unclamp-1': 'STARTABLE',
    });
    expect(states(batch, 'PANEL', 2)).toMatchObject({ 'glue-1': 'STARTABLE' });
  });
});
