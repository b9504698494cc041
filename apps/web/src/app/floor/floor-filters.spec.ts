import {
  isFiltered,
  lastDayOfWeek,
  NO_FILTERS,
  NOBODY,
  passes,
  readFilters,
  writeFilters,
} from './floor-filters';

const CARD = { people: ['m1'], designId: 'd1', dueDate: '2026-12-04', isLate: false };
const TUESDAY = '2026-12-01';
const shown = (filters: Partial<typeof NO_FILTERS>, card: Partial<typeof CARD> = {}) =>
  passes({ ...CARD, ...card }, { ...NO_FILTERS, ...filters }, TUESDAY);

describe('filters in the address', () => {
  it('come back as they were written', () => {
    const filters = { who: 'm1', design: 'd1', due: '2026-12-24', late: true };
    const query = writeFilters(filters) as Record<string, string>;
    expect(readFilters(query)).toEqual(filters);
    expect(readFilters({})).toEqual(NO_FILTERS);
    expect(isFiltered(readFilters({}))).toBe(false);
    expect(isFiltered(filters)).toBe(true);
  });

  it('leave the address when they are taken off, and only they', () => {
    expect(writeFilters({ late: false })).toEqual({ late: null });
    expect(writeFilters({ who: null })).toEqual({ who: null });
  });

  it.each(['yesterday', '2026-02-30', '12/24', ''])('do not take %s for a date', (due) => {
    expect(readFilters({ due, late: 'yes' })).toEqual(NO_FILTERS);
  });
});

describe('passes', () => {
  it('shows everything without filters', () => {
    expect(shown({})).toBe(true);
  });

  it('asks for the person, and for nobody', () => {
    expect([shown({ who: 'm1' }), shown({ who: 'm2' })]).toEqual([true, false]);
    expect([shown({ who: NOBODY }), shown({ who: NOBODY }, { people: [] })]).toEqual([false, true]);
  });

  it('asks for the design and for lateness', () => {
    expect([shown({ design: 'd1' }), shown({ design: 'd2' })]).toEqual([true, false]);
    expect([shown({ late: true }), shown({ late: true }, { isLate: true })]).toEqual([false, true]);
  });

  it('asks for a day, or for the week up to its Sunday and what is overdue', () => {
    expect([shown({ due: '2026-12-04' }), shown({ due: '2026-12-05' })]).toEqual([true, false]);
    const inWeek = (dueDate: string) => shown({ due: 'week' }, { dueDate });
    expect(['2026-11-20', '2026-12-06', '2026-12-07'].map(inWeek)).toEqual([true, true, false]);
    expect(passes({ ...CARD, dueDate: null }, { ...NO_FILTERS, due: 'week' }, TUESDAY)).toBe(false);
  });
});

describe('lastDayOfWeek', () => {
  it('is the Sunday, also on a Monday and on the Sunday itself', () => {
    expect(['2026-11-30', '2026-12-06', '2026-12-31'].map(lastDayOfWeek)).toEqual([
      '2026-12-06',
      '2026-12-06',
      '2027-01-03',
    ]);
  });
});
