import { hoursRows, readHours, timeText, type HoursRows, type SpanRow } from './hours-draft';

const HOURS = {
  weekly: [
    [
      { fromMinute: 480, toMinute: 720 },
      { fromMinute: 780, toMinute: 1_440 },
    ],
    ...Array.from({ length: 6 }, () => []),
  ],
  exceptions: [
    { date: '2026-12-24', spans: [{ fromMinute: 480, toMinute: 720 }], reason: 'half day' },
    { date: '2026-12-25', spans: [], reason: null },
  ],
};

function typed(rows: HoursRows, changes: Record<string, string> = {}) {
  const span = (row: SpanRow): [string, string][] => [
    [`from-${row.id}`, row.from],
    [`to-${row.id}`, row.to],
  ];
  const values = Object.fromEntries([
    ...rows.weekly.flat().flatMap(span),
    ...rows.exceptions.flatMap((row): [string, string][] => [
      [`date-${row.id}`, row.date],
      [`reason-${row.id}`, row.reason],
      ...row.spans.flatMap(span),
    ]),
  ]) as Record<string, string>;
  return (name: string) => ({ ...values, ...changes })[name] ?? '';
}

describe('the hours form', () => {
  it('gives back what it was filled with, the end of the day included', () => {
    const rows = hoursRows(HOURS, 0);
    expect(readHours(rows, typed(rows))).toEqual({ ...HOURS, problems: [] });
  });

  it('writes the end of the day as midnight and reads midnight as an end only at the end', () => {
    expect(timeText(1_440)).toBe('00:00');
    const rows = hoursRows(HOURS, 0);
    const draft = readHours(rows, typed(rows, { 'from-0-0-0': '00:00' }));
    expect(draft.weekly[0]?.[0]?.fromMinute).toBe(0);
    expect(draft.weekly[0]?.[1]?.toMinute).toBe(1_440);
  });

  it('asks for times and dates that are missing, beside their fields', () => {
    const rows = hoursRows(HOURS, 0);
    const read = typed(rows, { 'to-0-0-1': '', 'date-0-x1': '', 'from-0-x0-0': '' });
    expect(readHours(rows, read).problems.map((problem) => problem.field)).toEqual([
      'weekly.0.1.toMinute',
      'exceptions.0.spans.0.fromMinute',
      'exceptions.1.date',
    ]);
  });

  it('gives inputs other names with each filling', () => {
    const first = hoursRows(HOURS, 0).weekly[0]?.[0]?.id;
    expect(hoursRows(HOURS, 1).weekly[0]?.[0]?.id).not.toBe(first);
  });
});
