import {
  hoursRows,
  readHours,
  readMinute,
  timeText,
  type HoursRows,
  type SpanRow,
} from './hours-draft';

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

  it('writes and reads the end of the day as 24:00', () => {
    expect(timeText(1_440)).toBe('24:00');
    expect(timeText(485)).toBe('08:05');
    expect(readMinute('24:00')).toBe(1_440);
  });

  it.each([
    ['8', 480],
    ['8:05', 485],
    [' 08.30 ', 510],
    ['0800', 480],
    ['0', 0],
  ])('reads %s as people type it', (text, minute) => {
    expect(readMinute(text)).toBe(minute);
  });

  it.each(['', '25', '24:01', '8:60', '8:5', 'noon', '-1', '8:00 AM'])('refuses %s', (text) => {
    expect(readMinute(text)).toBeNull();
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
