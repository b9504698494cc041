import type { HoursRows, SpanRow } from './hours-draft';

/** Adds an empty span to a weekday (0 for Monday) or to the exception with the id. */
export function addSpan(rows: HoursRows, owner: number | string, id: string): HoursRows {
  const row: SpanRow = { id, from: '', to: '' };
  return {
    weekly: rows.weekly.map((spans, day) => (day === owner ? [...spans, row] : spans)),
    exceptions: rows.exceptions.map((exception) =>
      exception.id === owner ? { ...exception, spans: [...exception.spans, row] } : exception,
    ),
  };
}

export function removeSpan(rows: HoursRows, id: string): HoursRows {
  const without = (spans: readonly SpanRow[]) => spans.filter((span) => span.id !== id);
  return {
    weekly: rows.weekly.map(without),
    exceptions: rows.exceptions.map((each) => ({ ...each, spans: without(each.spans) })),
  };
}

/** A new exception is a day off until it gets spans. */
export function addException(rows: HoursRows, id: string): HoursRows {
  return { ...rows, exceptions: [...rows.exceptions, { id, date: '', reason: '', spans: [] }] };
}

export function removeException(rows: HoursRows, id: string): HoursRows {
  return { ...rows, exceptions: rows.exceptions.filter((exception) => exception.id !== id) };
}
