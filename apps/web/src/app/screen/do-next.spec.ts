import { apiBatch, apiFloor, NOW, ripped, run } from '../floor/floor-fixture';
import { toBoardBatch, toSurroundings, type ApiBatch, type BoardBatch } from '../floor/floor-view';
import { atWork, doNext } from './do-next';

const ZONE = 'Europe/Vienna';
const around = toSurroundings(apiFloor());
const now = Date.parse(NOW);

function board(more: Parameters<typeof apiBatch>[0]): BoardBatch {
  const made = toBoardBatch(apiBatch({ id: more?.code ?? 'b1', ...more }), around);
  if (!made) throw new Error('The fixture has no such route or design.');
  return made;
}
function planned(minutes: number): ApiBatch['forecast'] {
  const nextStartAt = new Date(now + minutes * 60_000).toISOString();
  return { readyAt: NOW, nextStartAt, slackMinutes: 60, slackDays: 0 };
}
const said = (...batches: BoardBatch[]) =>
  doNext(batches, ZONE, now).map((row) => `${row.what}: ${row.when}`);

describe('what to do next', () => {
  it('names the work, the batch and when the plan wants it', () => {
    expect(said(board({ code: 'CT-001', forecast: planned(0) }))).toEqual(['Mill CT-001: now']);
    expect(said(board({ code: 'CT-001', forecast: planned(75) }))).toEqual(['Mill CT-001: 15:21']);
  });

  it('goes by the plan, not by the code', () => {
    const early = board({ code: 'CT-009', forecast: planned(10) });
    const late = board({ code: 'CT-002', forecast: planned(90) });
    expect(said(late, early)).toEqual(['Mill CT-009: 14:16', 'Mill CT-002: 15:36']);
  });

  it('leaves out work under way', () => {
    expect(said(board({ code: 'CT-003', runs: [run('mill', 0, -20)] }))).toEqual([]);
  });

  it('takes pieces of one step together', () => {
    const ready = board({ code: 'CT-004', runs: ripped(60), forecast: planned(0) });
    expect(said(ready)).toEqual(['Glue CT-004 both panels: now']);
    const one = board({ code: 'CT-004', runs: [...ripped(60), run('glue-1', 1, -30, -10)] });
    expect(said(one)).toEqual(['Glue CT-004 panel 2: now']);
  });

  it('puts a maximum that presses before everything, and says by when', () => {
    const fresh = board({ code: 'CT-005', runs: ripped(23 * 60), forecast: planned(30) });
    const other = board({ code: 'CT-001', forecast: planned(0) });
    expect(said(other, fresh)).toEqual(['Glue CT-005 both panels: by 15:06', 'Mill CT-001: now']);
    expect(doNext([fresh], ZONE, now)[0]?.pressure).toBe('pressing');
  });

  it('says that a maximum is over', () => {
    const stale = board({ code: 'CT-005', runs: ripped(25 * 60) });
    expect(said(stale)).toEqual(['Glue CT-005 both panels: was due by 13:06']);
    expect(doNext([stale], ZONE, now)[0]?.pressure).toBe('over');
  });

  it('does not press while a maximum is far off', () => {
    const fresh = board({ code: 'CT-005', runs: ripped(60), forecast: planned(45) });
    expect(said(fresh)).toEqual(['Glue CT-005 both panels: 14:51']);
  });

  it('tells what comes when a hold clears, never before it does', () => {
    const runs = [...ripped(200), run('glue-1', 1, -60, -30), run('glue-1', 2, -45, -20)];
    const clamped = board({ code: 'CT-006', runs, forecast: planned(5) });
    expect(said(clamped)).toEqual(['Take CT-006 panel 1 out of clamps: 14:36']);
  });

  it('shows what is queued last while there is no plan', () => {
    const queued = board({ code: 'CT-001', releasedAt: null });
    const open = board({ code: 'CT-008' });
    expect(said(queued, open)).toEqual(['Mill CT-008: now', 'Mill CT-001: queued']);
  });

  it('names whom it is given to', () => {
    expect(doNext([board({ assignedTo: 'm2' })], ZONE, now)[0]?.people).toEqual(['m2']);
  });
});

describe('who is at work', () => {
  it('lists people with what they work on', () => {
    const batches = [
      board({ code: 'CT-003', runs: [run('mill', 0, -20)] }),
      board({ code: 'CT-002', runs: [...ripped(90), run('glue-1', 1, -10)] }),
      board({ code: 'CT-001', assignedTo: 'm2' }),
    ];
    expect(atWork(batches, now)).toEqual([{ memberId: 'm1', codes: ['CT-002', 'CT-003'] }]);
  });
});
