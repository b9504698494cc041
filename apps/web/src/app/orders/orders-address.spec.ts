import { FIRST_VIEW, MOST_PAGES, readView, sortedBy, sortRows, writeView } from './orders-address';

function row(code: string, changes: Partial<Parameters<typeof sortRows>[0][number]> = {}) {
  return {
    code,
    dueDate: '2026-12-10',
    shipBy: '2026-12-08',
    status: 'RECEIVED' as const,
    progressPercent: 0,
    forecastReadyAt: null,
    ...changes,
  };
}

const codes = (rows: readonly { code: string }[]) => rows.map((each) => each.code);

describe('the address of the orders', () => {
  it('gives back what was written into it', () => {
    const view = { status: 'IN_WORK', sort: 'progress', descending: true, pages: 3 } as const;
    expect(writeView(view)).toEqual({ status: 'in-work', sort: '-progress', pages: '3' });
    expect(readView({ status: 'in-work', sort: '-progress', pages: '3' })).toEqual(view);
  });

  it('is plain for the plain view', () => {
    expect(writeView(FIRST_VIEW)).toEqual({ status: null, sort: null, pages: null });
    expect(readView({})).toEqual(FIRST_VIEW);
  });

  it('takes what nobody wrote for nothing', () => {
    expect(readView({ status: 'lost', sort: '-colour', pages: 'many' })).toEqual(FIRST_VIEW);
    expect(readView({ pages: '0' }).pages).toBe(1);
    expect(readView({ pages: '999' }).pages).toBe(MOST_PAGES);
    expect(readView({ pages: '-3' }).pages).toBe(1);
  });

  it('turns a column round when it is pressed again', () => {
    const byCode = sortedBy(FIRST_VIEW, 'code');
    expect(byCode).toMatchObject({ sort: 'code', descending: false });
    expect(sortedBy(byCode, 'code')).toMatchObject({ sort: 'code', descending: true });
    expect(sortedBy(sortedBy(byCode, 'code'), 'due')).toMatchObject({ descending: false });
  });
});

describe('sorting orders', () => {
  it('goes by due date, then by the number of the code', () => {
    const rows = [row('OR-1000'), row('OR-999'), row('OR-5', { dueDate: '2026-12-11' })];
    expect(codes(sortRows(rows, FIRST_VIEW))).toEqual(['OR-999', 'OR-1000', 'OR-5']);
  });

  it('puts orders without a forecast last, whichever way round', () => {
    const rows = [
      row('OR-1'),
      row('OR-2', { forecastReadyAt: '2026-12-05T10:00:00Z' }),
      row('OR-3', { forecastReadyAt: '2026-12-04T10:00:00Z' }),
    ];
    const view = sortedBy(FIRST_VIEW, 'forecast');
    expect(codes(sortRows(rows, view))).toEqual(['OR-3', 'OR-2', 'OR-1']);
    expect(codes(sortRows(rows, sortedBy(view, 'forecast')))).toEqual(['OR-2', 'OR-3', 'OR-1']);
  });

  it('sorts by how far orders have come', () => {
    const rows = [
      row('OR-1', { status: 'SHIPPED', progressPercent: 100 }),
      row('OR-2', { status: 'IN_WORK', progressPercent: 40 }),
      row('OR-3'),
    ];
    expect(codes(sortRows(rows, sortedBy(FIRST_VIEW, 'status')))).toEqual(['OR-3', 'OR-2', 'OR-1']);
    const most = { ...sortedBy(FIRST_VIEW, 'progress'), descending: true };
    expect(codes(sortRows(rows, most))).toEqual(['OR-1', 'OR-2', 'OR-3']);
  });
});
