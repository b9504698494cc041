import type { HoursException as StoredException, WeeklyHours } from '#shared/time/hours';
import type { HoursException, HourSpan } from '#server/generated/schema';

/** Weekly hours as the API shows them, Monday first. */
export function presentWeekly(weekly: WeeklyHours): HourSpan[][] {
  return weekly.map(presentSpans);
}

export function presentException({ date, spans, reason }: StoredException): HoursException {
  return { date, spans: presentSpans(spans), reason: reason ?? null };
}

function presentSpans(spans: WeeklyHours[number]): HourSpan[] {
  return spans.map(({ from, to }) => ({ fromMinute: from, toMinute: to }));
}
