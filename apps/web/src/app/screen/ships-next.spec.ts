import { apiBatch, apiFloor, NOW } from '../floor/floor-fixture';
import { toBoardBatch, toSurroundings, type ApiBatch, type BoardBatch } from '../floor/floor-view';
import { shipsNext } from './ships-next';

const ZONE = 'Europe/Vienna';
const around = toSurroundings(apiFloor());
const now = Date.parse(NOW);

function board(code: string, shipBy: string | null, forecast: ApiBatch['forecast'] = null) {
  const made = toBoardBatch(apiBatch({ id: code, code, shipBy, forecast }), around);
  if (!made) throw new Error('The fixture has no such route or design.');
  return made;
}
function slack(slackMinutes: number, slackDays = 0): ApiBatch['forecast'] {
  return { readyAt: NOW, nextStartAt: null, slackMinutes, slackDays };
}
const said = (...batches: BoardBatch[]) =>
  shipsNext(batches, ZONE, now).map(
    (row) => `${row.batch.floor.code} ${row.day} ${row.slack}${row.late ? ' !' : ''}`,
  );

describe('what ships next', () => {
  it('goes by the ship-by date, of one day the latest against it first', () => {
    expect(
      said(
        board('CT-001', '2026-12-04', slack(60)),
        board('CT-002', '2026-12-02', slack(900, 1)),
        board('CT-003', '2026-12-04', slack(-300)),
      ),
    ).toEqual(['CT-002 Wed 1 d early', 'CT-003 Fri late by 5 h !', 'CT-001 Fri on the day']);
  });

  it('says today, a weekday while that is clear, and the date beyond', () => {
    const days = shipsNext(
      ['2026-12-01', '2026-12-07', '2026-12-08', '2027-01-04'].map((day) => board(day, day)),
      ZONE,
      now,
    ).map((row) => row.day);
    expect(days).toEqual(['today', 'Mon', 'Tue 8 Dec', 'Mon 4 Jan 2027']);
  });

  it('is late when the day is over, forecast or not', () => {
    expect(said(board('CT-001', '2026-11-30'))).toEqual(['CT-001 Mon 30 Nov late by 1 d !']);
  });

  it('leaves out what has no date', () => {
    expect(said(board('CT-001', null))).toEqual([]);
  });

  it('follows the shop’s midnight, not the device’s', () => {
    const late = Date.parse('2026-12-01T23:30:00Z');
    expect(shipsNext([board('CT-001', '2026-12-02')], ZONE, late)[0]?.day).toBe('today');
  });
});
