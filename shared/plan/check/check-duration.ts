import type { Calendar } from '#shared/time/calendar';
import type { Instant } from '#shared/time/instant';
import type { Activity, Placement, Problem } from '../model';
import type { View } from './violation';

const MINUTE = 60_000;

/** Whether work lasts as long as it should, inside the hours of its people and the shop, with no pause but theirs. */
export function checkDuration(view: View, activity: Activity, placement: Placement): void {
  const { problem, say } = view;
  const { id, state } = activity;
  const { segments } = placement;
  const first = segments[0];
  const last = segments.at(-1);
  if (!first || !last) {
    say('DURATION', id, 'is never worked on');
    return;
  }
  const begins = state.kind === 'FREE' ? placement.start : problem.now;
  if (state.kind === 'FREE' ? first.start !== begins : first.start < begins) {
    say('DURATION', id, 'is worked on from another time than its start');
  }
  if (last.end !== placement.end)
    say('DURATION', id, 'is worked on until another time than its end');
  const worked = segments.reduce((sum, { start, end }) => sum + end - start, 0);
  if (worked !== activity.minutes * MINUTE) {
    say('DURATION', id, `takes ${worked / MINUTE} minutes instead of ${activity.minutes}`);
  }
  if (
    segments.some(({ start, end }, i) => end <= start || start < (segments[i - 1]?.end ?? start))
  ) {
    say('DURATION', id, 'has spans that are empty or out of order');
  }
  if (!activity.pausable && segments.length > 1) say('ONE_SPAN', id, 'is interrupted');
  if (state.kind === 'STARTED' && !activity.pausable) {
    // It cannot be stopped, so that it goes on from now whatever the clock says.
    if (first.start !== problem.now) say('ONE_SPAN', id, 'has started and does not go on now');
    return;
  }
  const calendars = calendarsOf(problem, placement.people);
  for (const { start, end } of segments) {
    if (calendars.some((calendar) => !isOpenThrough(calendar, start, end))) {
      say('HOURS', id, 'is worked on outside hours');
    }
  }
  const starts = state.kind === 'FREE' ? [] : [{ start: begins, end: begins }];
  [...starts, ...segments].forEach(({ end }, i, spans) => {
    const next = spans[i + 1];
    if (next && commonMilliseconds(calendars, end, next.start) > 0) {
      say('PAUSE', id, 'pauses while everybody could go on');
    }
  });
}

function calendarsOf(problem: Problem, ids: readonly string[]): Calendar[] {
  const people = problem.people.filter((person) => ids.includes(person.id));
  return [problem.shop, ...people.map((person) => person.calendar)];
}

/** Whether one open interval covers all of a time. */
function isOpenThrough(calendar: Calendar, start: Instant, end: Instant): boolean {
  const i = lastStartingBy(calendar, start);
  return i >= 0 && end <= (calendar.ends[i] ?? -Infinity);
}

/** How long in [from, to) all calendars are open at once. */
function commonMilliseconds(calendars: readonly Calendar[], from: Instant, to: Instant): number {
  const [first, ...others] = calendars;
  if (from >= to) return 0;
  if (!first) return to - from;
  let sum = 0;
  for (let i = Math.max(0, lastStartingBy(first, from)); i < first.starts.length; i++) {
    const start = Math.max(from, first.starts[i] ?? Infinity);
    if (start >= to) break;
    sum += commonMilliseconds(others, start, Math.min(to, first.ends[i] ?? start));
  }
  return sum;
}

/** The last interval that begins at or before an instant; -1 when none does. */
function lastStartingBy({ starts }: Calendar, at: Instant): number {
  let low = 0;
  let high = starts.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((starts[middle] ?? Infinity) <= at) low = middle + 1;
    else high = middle;
  }
  return low - 1;
}
