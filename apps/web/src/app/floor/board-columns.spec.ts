import { CardCache, readCard, type BoardCard } from './board-card';
import { columnsOf, keepColumns } from './board-columns';
import { apiBatch, apiFloor, NOW, ripped, run } from './floor-fixture';
import { toBoardBatch, toSurroundings, type ApiBatch, type BoardBatch } from './floor-view';

const around = toSurroundings(apiFloor());
const at = Date.parse(NOW);

function board(batch: ApiBatch): BoardBatch {
  const made = toBoardBatch(batch, around);
  if (!made) throw new Error('The fixture has no such route or design.');
  return made;
}
const card = (batch: ApiBatch): BoardCard => readCard(board(batch), at);
const codes = (cards: readonly BoardCard[] | undefined) => cards?.map((c) => c.batch.floor.code);
const forecast = (nextStartAt: string | null, slackMinutes = 60) => ({
  readyAt: NOW,
  nextStartAt,
  slackMinutes,
  slackDays: 0,
});

describe('columnsOf', () => {
  it('puts each card onto the shelf of its place', () => {
    const columns = columnsOf([
      card(apiBatch({ id: 'a', code: 'CT-1', releasedAt: null })),
      card(apiBatch({ id: 'b', code: 'CT-2' })),
      card(apiBatch({ id: 'c', code: 'CT-3', runs: [run('mill', 0, -20)] })),
      card(
        apiBatch({
          id: 'd',
          code: 'CT-4',
          boards: 4,
          runs: [...ripped(300), run('glue-1', 1, -40, -20)],
        }),
      ),
    ]);
    const at = (place: string) => columns.find((column) => column.place === place);
    expect(codes(at('QUEUED')?.READY)).toEqual(['CT-1']);
    expect(codes(at('BLANK')?.READY)).toEqual(['CT-2']);
    expect(codes(at('BLANK')?.WORKING)).toEqual(['CT-3']);
    expect(codes(at('FIRST_GLUE_UP')?.HOLDING)).toEqual(['CT-4']);
    expect(at('BLANK')).toMatchObject({ count: 2, boards: 16 });
  });

  it("keeps the plan's order on the ready shelf, then ship-by, then the code", () => {
    const ready = (code: string, more: Partial<ApiBatch>) =>
      card(apiBatch({ ...more, id: code, code, runs: [] }));
    const columns = columnsOf([
      ready('CT-100', { shipBy: null }),
      ready('CT-20', { shipBy: null }),
      ready('CT-3', { shipBy: '2026-12-05' }),
      ready('CT-4', { forecast: forecast('2026-12-02T08:00:00Z') }),
      ready('CT-5', { forecast: forecast('2026-12-01T14:00:00Z') }),
    ]);
    expect(codes(columns[1]?.READY)).toEqual(['CT-5', 'CT-4', 'CT-3', 'CT-20', 'CT-100']);
  });

  it('sorts what holds by when it clears', () => {
    const curing = (code: string, ago: number) =>
      card(
        apiBatch({
          id: code,
          code,
          boards: 4,
          runs: [...ripped(900), run('glue-1', 1, -ago - 9, -ago)],
        }),
      );
    const columns = columnsOf([curing('CT-1', 10), curing('CT-2', 40)]);
    expect(codes(columns[2]?.HOLDING)).toEqual(['CT-2', 'CT-1']);
  });
});

describe('keepColumns', () => {
  it('keeps columns whose cards are the same objects', () => {
    const [one, other] = [card(apiBatch()), card(apiBatch({ id: 'b2', releasedAt: null }))];
    const before = columnsOf([one, other]);
    const after = keepColumns(
      before,
      columnsOf([one, card(apiBatch({ id: 'b2', version: 2, releasedAt: null }))]),
    );
    expect(after[1]).toBe(before[1]);
    expect(after[0]).not.toBe(before[0]);
    expect(keepColumns(before, columnsOf([one, other]))).toBe(before);
  });
});

describe('CardCache', () => {
  const batch = board(apiBatch({ boards: 4, runs: [...ripped(900), run('glue-1', 1, -40, -20)] }));
  const clears = at + 40 * 60_000;

  it('reads a card again only when its hold clears', () => {
    const cache = new CardCache();
    const first = cache.read(batch, at);
    expect(first).toMatchObject({ changesAt: clears, card: { shelf: 'HOLDING' } });
    expect(cache.read(batch, clears - 1)).toBe(first);
    const cleared = cache.read(batch, clears);
    expect(cleared.card.shelf).toBe('READY');
    expect(cleared.card.actions.map((action) => action.step.key)).toEqual(['unclamp-1']);
    expect(cleared.changesAt).toBeGreaterThan(clears);
  });

  it('never shows what was done a moment ago as still to come', () => {
    const justNow = board(apiBatch({ runs: [run('mill', 0, -20, 0.01)] }));
    expect(readCard(justNow, at).card.actions.map((action) => action.step.key)).toEqual(['rip']);
  });

  it('counts those at work and the one it is given to', () => {
    const both = card(apiBatch({ assignedTo: 'm2', runs: [run('mill', 0, -20)] }));
    expect(both.people).toEqual(['m1', 'm2']);
    expect(both.since).toBe(at - 20 * 60_000);
  });

  it('is late when the plan has less than no slack', () => {
    expect(card(apiBatch({ forecast: forecast(null, -1) })).isLate).toBe(true);
    expect(card(apiBatch({ forecast: forecast(null, 0) })).isLate).toBe(false);
    expect(card(apiBatch()).isLate).toBe(false);
  });
});
