import type { ClampClass } from '#shared/floor/model';
import {
  addWorkingMinutes,
  firstWholeSpan,
  intersect,
  nextOpen,
  type Calendar,
} from '#shared/time/calendar';
import type { Instant } from '#shared/time/instant';
import type { Activity, Person, Problem, Reason } from './model';
import { Profile } from './profile';

/** A slot for work: when, with whom, and what kept it from being earlier. */
export interface Slot {
  start: Instant;
  end: Instant;
  people: string[];
  reason: Reason | null;
}

/** How often a start is moved on before a search is given up. */
const MOST_MOVES = 4_000;

/** Who and what is taken when, while a plan is laid. Everything that is booked can be taken back. */
export class Ledger {
  private readonly busy = new Map<string, Profile>();
  private readonly stations = new Map<string, { capacity: number; use: Profile }>();
  private readonly clampUse = new Map<string, Profile>();
  private readonly clamps: readonly ClampClass[];
  private readonly calendars = new Map<string, Calendar>();

  constructor(private readonly problem: Problem) {
    for (const person of problem.people) this.busy.set(person.id, new Profile());
    for (const { key, capacity } of problem.stations) {
      this.stations.set(key, { capacity, use: new Profile() });
    }
    this.clamps = [...problem.clamps].sort((a, b) =>
      a.length < b.length ? -1 : a.length > b.length ? 1 : 0,
    );
    for (const { key } of this.clamps) this.clampUse.set(key, new Profile());
  }

  bookPerson(id: string, start: Instant, end: Instant, sign: 1 | -1 = 1): void {
    this.busy.get(id)?.add(start, end, sign);
  }

  bookStation(key: string, start: Instant, end: Instant, units: number): void {
    this.stations.get(key)?.use.add(start, end, units);
  }

  bookClamps(key: string, start: Instant, end: Instant, units: number): void {
    this.clampUse.get(key)?.add(start, end, units);
  }

  /** Whether a station has room in an interval; else the first time at which it may have. */
  stationRoom(key: string, start: Instant, end: Instant, units: number): true | Instant | null {
    const station = this.stations.get(key);
    if (!station) return true;
    if (station.use.highest(start, end) + units <= station.capacity) return true;
    return station.use.nextFall(start);
  }

  /** Clamps that are free through an interval, the shortest that will do first; else when more may be free. */
  clampRoom(
    length: bigint,
    units: number,
    start: Instant,
    end: Instant,
  ): { key: string; units: number }[] | Instant | null {
    const chosen: { key: string; units: number }[] = [];
    let missing = units;
    let next: Instant | null = null;
    for (const clamp of this.clamps) {
      if (clamp.length < length) continue;
      const use = this.clampUse.get(clamp.key);
      if (!use) continue;
      const free = Math.min(missing, Math.max(0, clamp.count - use.highest(start, end)));
      if (free > 0) chosen.push({ key: clamp.key, units: free });
      missing -= free;
      const fall = use.nextFall(start);
      if (fall !== null && (next === null || fall < next)) next = fall;
    }
    return missing === 0 ? chosen : next;
  }

  /**
   * The earliest slot from `from` on in which enough people with the skill can do the work: whole in one span of all of
   * them, or pausing where their hours pause and never for other work. Null when there is none before the horizon.
   */
  slot(activity: Activity, from: Instant): Slot | null {
    let best: Slot | null = null;
    for (const crew of this.crews(activity)) {
      const slot = this.slotFor(activity, crew, from);
      if (slot && (!best || slot.end < best.end)) best = slot;
    }
    return best;
  }

  /** The earliest slot of one person; null when they are not of the shop or have none before the horizon. */
  slotOfPerson(activity: Activity, personId: string, from: Instant): Slot | null {
    const person = this.problem.people.find((candidate) => candidate.id === personId);
    return person ? this.slotFor(activity, [person], from) : null;
  }

  /** Whether the work has a slot at all, were everyone free. */
  slotIfAlone(activity: Activity): boolean {
    return this.crews(activity).some(
      (crew) => spanFrom(this.calendarOf(crew), this.problem.now, activity) !== null,
    );
  }

  /** All groups of people who could do the work together. */
  crews(activity: Activity): Person[][] {
    const able = this.problem.people.filter(
      (person) => activity.skill === null || person.skills.includes(activity.skill),
    );
    return combinations(able, activity.people);
  }

  calendarOf(crew: readonly Person[]): Calendar {
    const key = crew.map((person) => person.id).join(' ');
    let calendar = this.calendars.get(key);
    if (!calendar) {
      calendar = crew.map((person) => person.calendar).reduce(intersect);
      this.calendars.set(key, calendar);
    }
    return calendar;
  }

  private slotFor(activity: Activity, crew: readonly Person[], from: Instant): Slot | null {
    const calendar = this.calendarOf(crew);
    const people = crew.map((person) => person.id);
    let at = from;
    let reason: Reason | null = null;
    for (let moves = 0; moves < MOST_MOVES; moves++) {
      const span = spanFrom(calendar, at, activity);
      if (!span) return null;
      if (span.start > at) reason = { code: 'HOURS' };
      const free = this.whenFree(people, span.start, span.end);
      if (free === true) return { ...span, people, reason };
      if (free === null) return null;
      reason = { code: 'PEOPLE' };
      at = free;
    }
    return null;
  }

  /** Whether all are free in an interval; else the first time after its start at which one of them becomes free. */
  private whenFree(people: readonly string[], start: Instant, end: Instant): true | Instant | null {
    for (const id of people) {
      const busy = this.busy.get(id);
      if (!busy || busy.highest(start, end) === 0) continue;
      return busy.nextFall(start);
    }
    return true;
  }
}

function spanFrom(
  calendar: Calendar,
  at: Instant,
  activity: Activity,
): { start: Instant; end: Instant } | null {
  if (!activity.pausable) return firstWholeSpan(calendar, at, activity.minutes);
  const start = nextOpen(calendar, at);
  if (start === null) return null;
  const end = addWorkingMinutes(calendar, start, activity.minutes);
  return end === null ? null : { start, end };
}

function combinations<T>(items: readonly T[], size: number): T[][] {
  if (size === 0) return [[]];
  return items.flatMap((item, i) =>
    combinations(items.slice(i + 1), size - 1).map((rest) => [item, ...rest]),
  );
}
