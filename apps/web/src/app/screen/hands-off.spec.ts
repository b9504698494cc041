import { apiBatch, apiFloor, NOW, ripped, run } from '../floor/floor-fixture';
import { toBoardBatch, toSurroundings, type BoardBatch } from '../floor/floor-view';
import { handsOff } from './hands-off';

const ZONE = 'Europe/Vienna';
const around = toSurroundings(apiFloor());
const now = Date.parse(NOW);

function board(more: Parameters<typeof apiBatch>[0]): BoardBatch {
  const made = toBoardBatch(apiBatch({ id: more?.code ?? 'b1', ...more }), around);
  if (!made) throw new Error('The fixture has no such route or design.');
  return made;
}
const rows = (...batches: BoardBatch[]) => handsOff(batches, ZONE, now);
const said = (...batches: BoardBatch[]) =>
  rows(...batches).map((row) => `${row.batch.floor.code} ${row.what}: ${row.until}`);

describe('hands off until', () => {
  it('says of a piece in clamps that it is in clamps, not that it cures', () => {
    const runs = [...ripped(200), run('glue-1', 1, -40, -20)];
    expect(said(board({ code: 'CT-001', runs }))).toEqual(['CT-001 panel 1 in clamps: 14:46']);
  });

  it('goes on to the cure when the clamps are off', () => {
    const runs = [...ripped(400), run('glue-1', 1, -140, -120), run('unclamp-1', 1, -50, -45)];
    expect(said(board({ code: 'CT-001', runs }))).toEqual(['CT-001 panel 1 curing: Wed 00:06']);
  });

  it('takes pieces together that clear within the hour, and says when the last of them is clear', () => {
    const runs = [...ripped(200), run('glue-1', 1, -60, -40), run('glue-1', 2, -35, -10)];
    expect(said(board({ code: 'CT-001', runs }))).toEqual(['CT-001 2 panels in clamps: 14:56']);
  });

  it('keeps pieces apart that clear at other times of the day', () => {
    const glued = (piece: number, ago: number) => [
      run('glue-1', piece, -ago - 20, -ago),
      run('unclamp-1', piece, -ago + 61, -ago + 66),
    ];
    const runs = [...ripped(1_000), ...glued(1, 600), ...glued(2, 300)];
    expect(said(board({ code: 'CT-001', runs }))).toEqual([
      'CT-001 panel 1 curing: 16:06',
      'CT-001 panel 2 curing: 21:06',
    ]);
  });

  it('sorts by when it clears and burns down', () => {
    const soon = board({ code: 'CT-002', runs: [...ripped(200), run('glue-1', 1, -65, -45)] });
    const later = board({ code: 'CT-001', runs: [...ripped(200), run('glue-1', 1, -40, -15)] });
    const [first, second] = rows(later, soon);
    expect([first?.batch.floor.code, first?.soon, first?.left]).toEqual(['CT-002', true, 0.25]);
    expect([second?.batch.floor.code, second?.left]).toEqual(['CT-001', 0.75]);
  });

  it('shows nothing when nothing is held', () => {
    expect(rows(board({}), board({ code: 'CT-002', runs: ripped(30) }))).toEqual([]);
  });
});
