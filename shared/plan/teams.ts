import { firstWholeSpan, intersect, nextOpen, type Calendar } from '#shared/time/calendar';
import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { Activity, Person, Problem, Span } from './model';
import { Profile, type Journal } from './profile';

/** Never look at more combinations of people than this: beyond, the first ones by id stand for all. */
const MOST_TEAMS = 1_000;

/** People who do one piece of work together, and when all of them and the shop work. */
export interface Team {
  readonly people: readonly string[];
  readonly calendar: Calendar;
  /** Skills of its people together: of two teams that would do, the one with fewer is taken. */
  readonly skills: number;
}

/** When a team would be at a piece of work, and what it last waited for. */
export interface Stint {
  readonly team: Team;
  readonly start: Instant;
  readonly end: Instant;
  readonly segments: readonly Span[];
  /** BUSY: until the start its people were at other work. HOURS: from `since` on it was closed, or open too briefly. */
  readonly cause: { code: 'NONE' } | { code: 'BUSY' } | { code: 'HOURS'; since: Instant };
}

/** People's hours and what they are at. */
export class Teams {
  private readonly profiles = new Map<string, Profile>();
  private readonly people: readonly Person[];
  private readonly known = new Map<string, readonly Team[]>();
  private readonly calendars = new Map<string, Calendar>();

  constructor(
    private readonly problem: Problem,
    private readonly journal: Journal,
  ) {
    this.people = [...problem.people].sort((a, b) => (a.id < b.id ? -1 : 1));
    for (const person of this.people) this.profiles.set(person.id, new Profile());
  }

  /** All teams of the size an activity needs whose people all have its skill. */
  teamsFor(activity: Pick<Activity, 'people' | 'skill'>): readonly Team[] {
    const key = `${activity.people}/${activity.skill ?? ''}`;
    let teams = this.known.get(key);
    if (!teams) {
      const able = this.able(activity.skill);
      teams = combinations(able, activity.people).map((people) => this.team(people));
      this.known.set(key, teams);
    }
    return teams;
  }

  able(skill: string | null): Person[] {
    return this.people.filter((person) => skill === null || person.skills.includes(skill));
  }

  /** The hours that people have in common; the shop's when there are none of them. */
  calendarOf(ids: readonly string[]): Calendar {
    const key = ids.join('/');
    let calendar = this.calendars.get(key);
    if (!calendar) {
      calendar = this.problem.shop;
      for (const person of this.people) {
        if (ids.includes(person.id)) calendar = intersect(calendar, person.calendar);
      }
      this.calendars.set(key, calendar);
    }
    return calendar;
  }

  busy(ids: readonly string[], segments: readonly Span[]): void {
    for (const id of ids) {
      const profile = this.profiles.get(id);
      for (const { start, end } of segments) {
        profile?.add(start, end, 1);
        this.journal.note(() => profile?.add(start, end, -1));
      }
    }
  }

  /** The earliest that a team can do the work from an instant on; null when it cannot before its calendar ends. */
  stint(team: Team, activity: Activity, from: Instant): Stint | null {
    const profiles = team.people.flatMap((id) => this.profiles.get(id) ?? []);
    let at = from;
    let waited = false;
    for (;;) {
      const segments = workFrom(team.calendar, at, activity.minutes, activity.pausable);
      const first = segments?.[0];
      const last = segments?.at(-1);
      if (!segments || !first || !last) return null;
      const busyUntil = lastBusy(profiles, segments);
      if (busyUntil === null) {
        const cause =
          first.start > at
            ? ({ code: 'HOURS', since: at } as const)
            : ({ code: waited ? 'BUSY' : 'NONE' } as const);
        return { team, start: first.start, end: last.end, segments, cause };
      }
      at = busyUntil;
      waited = true;
    }
  }

  private team(people: readonly Person[]): Team {
    const ids = people.map((person) => person.id);
    return {
      people: ids,
      calendar: this.calendarOf(ids),
      skills: people.reduce((sum, person) => sum + person.skills.length, 0),
    };
  }
}

/** The spans in which work that begins at or after an instant is done; null when hours do not suffice. */
export function workFrom(
  calendar: Calendar,
  from: Instant,
  minutes: number,
  pausable: boolean,
): Span[] | null {
  if (!pausable) {
    const span = firstWholeSpan(calendar, from, minutes);
    return span && [span];
  }
  const segments: Span[] = [];
  let left = minutes * MINUTE_MS;
  let at = from;
  while (left > 0) {
    const start = nextOpen(calendar, at);
    if (start === null) return null;
    const end = Math.min(closingOf(calendar, start), start + left);
    segments.push({ start, end });
    left -= end - start;
    at = end;
  }
  return segments;
}

/** The end of the open interval that contains an instant. */
function closingOf({ ends }: Calendar, at: Instant): Instant {
  let low = 0;
  let high = ends.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((ends[middle] ?? Infinity) > at) high = middle;
    else low = middle + 1;
  }
  return ends[low] ?? at;
}

function lastBusy(profiles: readonly Profile[], segments: readonly Span[]): number | null {
  for (let i = segments.length - 1; i >= 0; i--) {
    const segment = segments[i];
    if (!segment) continue;
    let latest: number | null = null;
    for (const profile of profiles) {
      const until = profile.lastAbove(segment.start, segment.end, 0);
      if (until !== null && (latest === null || until > latest)) latest = until;
    }
    if (latest !== null) return latest;
  }
  return null;
}

function combinations(people: readonly Person[], size: number): Person[][] {
  if (size <= 0) return [[]];
  const found: Person[][] = [];
  const extend = (chosen: Person[], from: number) => {
    if (found.length >= MOST_TEAMS) return;
    if (chosen.length === size) {
      found.push(chosen);
      return;
    }
    people.slice(from).forEach((person, i) => extend([...chosen, person], from + i + 1));
  };
  extend([], 0);
  return found;
}
