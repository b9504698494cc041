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
      fromMinute: readTime(read(`from-${row.id}`), `${path}.${index}.fromMinute`, problems),
      toMinute: readTime(read(`to-${row.id}`), `${path}.${index}.toMinute`, problems),
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

/** `08:00`; the end of the day is `24:00`. */
export function timeText(minute: number): string {
  const two = (count: number): string => String(count).padStart(2, '0');
  return `${two(Math.floor(minute / 60))}:${two(minute % 60)}`;
}

/** The minute of the day for `8`, `8:00`, `08.00`, `0800` or `24:00`; null for anything else. */
export function readMinute(text: string): number | null {
  const parts = /^(\d{1,2})(?:[:.h]?(\d{2}))?$/.exec(text.trim());
  if (!parts) return null;
  const [hours, minutes] = [Number(parts[1]), Number(parts[2] ?? 0)];
  const minute = hours * 60 + minutes;
  return minutes < 60 && minute <= 1_440 ? minute : null;
}

function spanRows(spans: readonly Span[], prefix: string): SpanRow[] {
  return spans.map((span, index) => ({
    id: `${prefix}-${index}`,
    from: timeText(span.fromMinute),
    to: timeText(span.toMinute),
  }));
}

function readTime(text: string, field: string, problems: FormProblem[]): number {
  const minute = readMinute(text);
  if (minute === null) problems.push({ field, sentence: 'Enter a time, such as 08:00.' });
  return minute ?? 0;
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
