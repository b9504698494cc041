import { weekdayOf, type LocalDate } from './zone';

/** A span of working time inside one local day, half open, in minutes of the day by the clock. */
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

/** The spans worked on a date. */
export function spansOn(hours: Hours, date: LocalDate): readonly Span[] {
  const exception = hours.exceptions.find((candidate) => candidate.date === date);
  return exception ? exception.spans : (hours.weekly[weekdayOf(date) - 1] ?? []);
}
