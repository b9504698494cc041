import { weekdayOf, type LocalDate } from './zone';

/**
 * A span of working time inside one local day, half open, in minutes of the day by the clock (0 to 1440). It is one
 * stretch: from the first moment at which the clock shows `from` to the first at which it shows `to` (or, where clocks
 * jump over them, the moment of the jump). So work over a change of clocks lasts as long as it really lasts, an hour
 * that is skipped is worked by no one, and an hour that comes twice is worked through by whoever works across its end.
 */
export interface Span {
  from: number;
  to: number;
}

/** Seven lists of spans, Monday first. */
export type WeeklyHours = readonly (readonly Span[])[];

/** A date on which the weekly hours do not hold; no spans: closed. */
export interface HoursException {
  date: LocalDate;
  spans: readonly Span[];
  reason?: string;
}

/** Working hours in an IANA zone. */
export interface Hours {
  zone: string;
  weekly: WeeklyHours;
  exceptions: readonly HoursException[];
}

/** The spans worked on a date: of its exception, else of its weekday. Of two exceptions for a date the first holds. */
export function spansOn(hours: Hours, date: LocalDate): readonly Span[] {
  const exception = hours.exceptions.find((candidate) => candidate.date === date);
  return exception ? exception.spans : weeklySpans(hours, weekdayOf(date));
}

/** The spans of a weekday, 1 Monday to 7 Sunday. */
export function weeklySpans(hours: Hours, weekday: number): readonly Span[] {
  return hours.weekly[weekday - 1] ?? [];
}

/** The exceptions by date, for whoever looks at many dates. */
export function exceptionsByDate(hours: Hours): Map<LocalDate, readonly Span[]> {
  return new Map(hours.exceptions.toReversed().map(({ date, spans }) => [date, spans]));
}
