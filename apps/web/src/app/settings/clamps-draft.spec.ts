import { clampRows, readClamps, type ClampRow } from './clamps-draft';

const STORED = [
  { key: 'c600', length: '600000000', count: 12 },
  { key: 'c900', length: '900000000', count: 6 },
];

function typed(rows: readonly ClampRow[], changes: Record<string, string> = {}) {
  const values = Object.fromEntries(
    rows.flatMap((row) => [
      [`length-${row.id}`, row.length],
      [`count-${row.id}`, row.count],
    ]),
  );
  return (name: string) => ({ ...values, ...changes })[name] ?? '';
}

describe('the clamps form', () => {
  it('gives back what it was filled with', () => {
    const rows = clampRows(STORED, 'MILLIMETRE', 0);
    expect(readClamps(rows, 'MILLIMETRE', typed(rows))).toEqual({ clamps: STORED, problems: [] });
  });

  it('leaves a length alone that is shown rounded', () => {
    const rows = clampRows(STORED, 'INCH', 0);
    expect(rows[0]?.length).toBe('23 5/8 in');
    expect(readClamps(rows, 'INCH', typed(rows)).clamps[0]?.length).toBe('600000000');
    const read = typed(rows, { 'length-0-0': '23 5/8' });
    expect(readClamps(rows, 'INCH', read).clamps[0]?.length).toBe('600075000');
  });

  it('says what is wrong with a length once, in the words for lengths', () => {
    const rows = clampRows(STORED, 'MILLIMETRE', 0);
    const { problems } = readClamps(rows, 'MILLIMETRE', typed(rows, { 'length-0-1': 'long' }));
    expect(problems.map((problem) => problem.field)).toEqual(['1.length']);
    expect(problems[0]?.sentence).toContain('not a length');
  });

  it('refuses counts that are no counts, and the same length twice', () => {
    const rows = clampRows(STORED, 'MILLIMETRE', 0);
    const fields = (changes: Record<string, string>) =>
      readClamps(rows, 'MILLIMETRE', typed(rows, changes)).problems.map((each) => each.field);
    expect(fields({ 'count-0-0': '' })).toEqual(['0.count']);
    expect(fields({ 'count-0-0': '-1' })).toEqual(['0.count']);
    expect(fields({ 'count-0-0': '501' })).toEqual(['0.count']);
    expect(fields({ 'length-0-1': '60 cm' })).toEqual(['1.length']);
  });
});
