import type { FormProblem } from '../ui/problem-list';

/** A span of working time as the API has it, minutes of the local day. */
export interface Span {
  readonly fromMinute: number;
  readonly toMinute: number;
}

export interface HoursException {
  readonly date: string;
  readonly spans: readonly Span[];
  readonly reason: string | null;
}

/** A span on the form: `id` names its two inputs, the texts are what they begin with, as `08:00`. */
export interface SpanRow {
  readonly id: string;
  readonly from: string;
  readonly to: string;
}

export interface ExceptionRow {
  readonly id: string;
  readonly date: string;
  readonly reason: string;
  readonly spans: readonly SpanRow[];
}

export interface HoursRows {
  /** Seven, Monday first. */
  readonly weekly: readonly (readonly SpanRow[])[];
  readonly exceptions: readonly ExceptionRow[];
}

export interface HoursDraft {
  readonly weekly: Span[][];
  readonly exceptions: { date: string; spans: Span[]; reason: string | null }[];
  /** Fields are `weekly.0.1.fromMinute`, `exceptions.2.date`, `exceptions.2.spans.0.toMinute`. */
  readonly problems: FormProblem[];
}

export const DAYS = [
  ...(['Monday', 'Tuesday', 'Wednesday', 'Thursday'] as const),
  ...(['Friday', 'Saturday', 'Sunday'] as const),
];

export function hoursRows(
  hours: {
    readonly weekly: readonly (readonly Span[])[];
    readonly exceptions: readonly HoursException[];
  },
  filling: number,
): HoursRows {
  return {
    weekly: hours.weekly.map((spans, day) => spanRows(spans, `${filling}-${day}`)),
    exceptions: hours.exceptions.map((exception, index) => ({
      id: `${filling}-x${index}`,
      date: exception.date,
      reason: exception.reason ?? '',
      spans: spanRows(exception.spans, `${filling}-x${index}`),
    })),
  };
}

/** What was typed, as the API takes it. `read` gives the text of an input by its name. */
export function readHours(rows: HoursRows, read: (name: string) => string): HoursDraft {
  const problems: FormProblem[] = [];
  const spans = (list: readonly SpanRow[], path: string): Span[] =>
    list.map((row, index) => ({
      fromMinute: readTime(read(`from-${row.id}`), false, `${path}.${index}.fromMinute`, problems),
      toMinute: readTime(read(`to-${row.id}`), true, `${path}.${index}.toMinute`, problems),
    }));
  return {
    weekly: rows.weekly.map((list, day) => spans(list, `weekly.${day}`)),
    exceptions: rows.exceptions.map((row, index) => {
      const date = read(`date-${row.id}`);
      if (!/^\d{4}-\d{2}-\d{2}$/.test(date)) {
        problems.push({ field: `exceptions.${index}.date`, sentence: 'Choose a date.' });
      }
      const reason = read(`reason-${row.id}`).trim();
      return {
        date,
        spans: spans(row.spans, `exceptions.${index}.spans`),
        reason: reason === '' ? null : reason,
      };
    }),
    problems,
  };
}

/** `08:00`; the day's end, minute 1440, is `00:00`, as a time input has no 24:00. */
export function timeText(minute: number): string {
  const of = minute % 1_440;
  return `${String(Math.floor(of / 60)).padStart(2, '0')}:${String(of % 60).padStart(2, '0')}`;
}

function spanRows(spans: readonly Span[], prefix: string): SpanRow[] {
  return spans.map((span, index) => ({
    id: `${prefix}-${index}`,
    from: timeText(span.fromMinute),
    to: timeText(span.toMinute),
  }));
}

function readTime(text: string, isEnd: boolean, field: string, problems: FormProblem[]): number {
  const parts = /^(\d{2}):(\d{2})/.exec(text);
  if (!parts) {
    problems.push({ field, sentence: 'Enter a time, such as 08:00.' });
    return 0;
  }
  const minute = Number(parts[1]) * 60 + Number(parts[2]);
  return isEnd && minute === 0 ? 1_440 : minute;
}

/** Every field that has a place of its own on the form. */
export function hoursFields(rows: HoursRows): string[] {
  const spanFields = (spans: readonly SpanRow[], path: string): string[] => [
    path,
    ...spans.flatMap((_span, index) =>
      ['', '.fromMinute', '.toMinute'].map((end) => `${path}.${index}${end}`),
    ),
  ];
  return [
    ...rows.weekly.flatMap((spans, day) => spanFields(spans, `weekly.${day}`)),
    ...rows.exceptions.flatMap((row, index) => [
      ...['', '.date', '.reason'].map((end) => `exceptions.${index}${end}`),
      ...spanFields(row.spans, `exceptions.${index}.spans`),
    ]),
  ];
}
