import { isOpen } from '#shared/time/calendar';
import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { Bookings } from './bookings';
import type { Activity, Problem, Reason } from './model';
import type { Stint } from './teams';

/** Where an activity could be laid as far as its own time goes, and what kept it from an earlier one. */
export interface Spot {
  readonly stint: Stint;
  readonly reason: Reason;
}

/**
 * The earliest spot from an instant on at which people, stations and clamps are free for as long as the work lasts. Null
 * when people's hours end before there is one; HELD when what it needs is never given back.
 */
export function earliestSpot(
  problem: Problem,
  bookings: Bookings,
  activity: Activity,
  from: { at: Instant; reason: Reason },
  favourite: string | null,
): Spot | 'HELD' | null {
  let { at, reason } = from;
  for (;;) {
    const stint = bestStint(bookings, activity, at, favourite);
    if (!stint) return null;
    const blocked = blockedBy(bookings, activity, stint);
    if (!blocked) return { stint, reason };
    if (blocked.until === Infinity) return 'HELD';
    at = Math.ceil(blocked.until / MINUTE_MS) * MINUTE_MS;
    reason =
      blocked.station === null
        ? { code: 'CLAMPS', at, holders: [] }
        : { code: 'STATION', at, station: blocked.station, holders: [] };
    if (at >= problem.horizonEnd) return null;
  }
}

/**
 * Who is done first; then who can begin first; then the person it is given to; then whoever has the fewest skills, so that
 * the others stay free for what only they can do.
 */
function bestStint(
  bookings: Bookings,
  activity: Activity,
  at: Instant,
  favourite: string | null,
): Stint | null {
  let best: Stint | null = null;
  for (const team of bookings.teams.teamsFor(activity)) {
    const stint = bookings.teams.stint(team, activity, at);
    if (stint && (!best || isBetter(stint, best, favourite))) best = stint;
  }
  return best;
}

function isBetter(a: Stint, b: Stint, favourite: string | null): boolean {
  if (a.end !== b.end) return a.end < b.end;
  if (a.start !== b.start) return a.start < b.start;
  const isFavourite = (stint: Stint) => favourite !== null && stint.team.people.includes(favourite);
  if (isFavourite(a) !== isFavourite(b)) return isFavourite(a);
  return a.team.skills < b.team.skills;
}

function blockedBy(
  bookings: Bookings,
  activity: Activity,
  { start, end }: Stint,
): { until: number; station: string | null } | null {
  for (const take of activity.takes) {
    const until = bookings.stationShortUntil(activity, take, start, end);
    if (until !== null) {
      return { until, station: bookings.station(take.resource)?.of.station ?? take.resource };
    }
  }
  if (!activity.clamps) return null;
  const chosen = bookings.chooseClamps(activity.clamps, start, end);
  return 'shortUntil' in chosen ? { until: chosen.shortUntil, station: null } : null;
}

/** The reason for a start, once it is known whether people or hours moved it on from what was reason before. */
export function hoursReason(problem: Problem, stint: Stint, before: Reason): Reason {
  const { cause, start, team } = stint;
  switch (cause.code) {
    case 'NONE':
      return before;
    case 'BUSY':
      return { code: 'PEOPLE', at: start, people: team.people, holders: [] };
    case 'HOURS': {
      const whose = !isOpen(problem.shop, cause.since)
        ? 'SHOP'
        : isOpen(team.calendar, cause.since)
          ? 'FIT'
          : 'PEOPLE';
      return { code: 'HOURS', at: start, since: cause.since, whose, people: team.people };
    }
  }
}
