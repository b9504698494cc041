import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { Bookings } from './bookings';
import type { Graph } from './graph';
import { MaximumShifts } from './maximum-shifts';
import type { Activity, Placement, Problem, Reason } from './model';
import { earliestSpot, hoursReason, type Spot } from './spot';
import { workFrom } from './teams';

/** Searches for one list give up after so many spots looked at, so that nothing tangled takes for ever. */
const LEAST_EFFORT = 20_000;
const EFFORT_EACH = 1_000;

/** An activity for which there is no room; held: because of something that nothing gives back. */
export interface Failure {
  readonly kind: 'FAILED';
  readonly activity: Activity;
  readonly isHeld: boolean;
}

/** The list has to be laid again from an activity on, which now has to start later. */
interface Again {
  readonly kind: 'AGAIN';
  readonly from: string;
}

/** Not now: what it needs is short until an instant. */
interface Short {
  readonly kind: 'SHORT';
  readonly until: number;
  readonly reason: Reason;
}

/** Lays activities into the time that is left, each at its earliest. */
export class Lay {
  readonly placed = new Map<string, Placement>();
  private readonly preferred: ReadonlyMap<string, string | null>;
  /** Of the list being laid: which of its entries placed an activity. */
  private readonly placedBy = new Map<string, number>();
  private current = 0;
  private effort = 0;
  private shifts = new MaximumShifts();

  constructor(
    private readonly problem: Problem,
    private readonly bookings: Bookings,
    private readonly graph: Graph,
  ) {
    this.preferred = new Map(problem.batches.map((batch) => [batch.id, batch.preferred]));
  }

  /** Work under way goes on with the people at it; what may not pause goes on whatever the clock says. */
  goOn(activity: Activity): boolean {
    const { now } = this.problem;
    if (activity.state.kind !== 'STARTED') return false;
    const { startedAt, people } = activity.state;
    const segments = activity.pausable
      ? workFrom(this.bookings.teams.calendarOf(people), now, activity.minutes, true)
      : [{ start: now, end: now + activity.minutes * MINUTE_MS }];
    const end = segments?.at(-1)?.end;
    if (!segments || end === undefined) return false;
    this.bookings.teams.busy(people, segments);
    this.placed.set(activity.id, {
      ...nameOf(activity),
      start: startedAt,
      end,
      segments,
      people,
      clamps: [],
      reason: { code: 'STARTED' },
    });
    this.bookings.journal.commit();
    return true;
  }

  /** Lays all that is not placed yet, in the order given (what comes before first); all of it or nothing. */
  layAll(activities: readonly Activity[]): Failure | null {
    const { journal } = this.bookings;
    const marks: number[] = [];
    this.shifts = new MaximumShifts();
    this.effort = LEAST_EFFORT + EFFORT_EACH * activities.length;
    for (let i = 0; i < activities.length; i++) {
      marks[i] = journal.mark();
      const activity = activities[i];
      if (!activity || activity.state.kind !== 'FREE' || this.placed.has(activity.id)) continue;
      this.current = i;
      const outcome = this.put(activity);
      if (outcome?.kind === 'FAILED') {
        journal.rollback(marks[0] ?? 0);
        return outcome;
      }
      if (outcome?.kind === 'AGAIN') {
        const back = this.placedBy.get(outcome.from) ?? 0;
        journal.rollback(marks[back] ?? 0);
        i = back - 1;
      }
    }
    journal.commit();
    this.placedBy.clear();
    return null;
  }

  /** When the last of some activities ends; null when one of them is not placed, or there are none. */
  endOf(ids: readonly string[]): Instant | null {
    let last: Instant | null = null;
    for (const id of ids) {
      const state = this.graph.get(id)?.state;
      const end = state?.kind === 'DONE' ? state.finishedAt : this.placed.get(id)?.end;
      if (end === undefined) return null;
      last = last === null ? end : Math.max(last, end);
    }
    return last;
  }

  private put(activity: Activity): Failure | Again | null {
    const { journal } = this.bookings;
    let from = this.bound(activity);
    while (from && this.effort-- > 0) {
      const spot = earliestSpot(
        this.problem,
        this.bookings,
        activity,
        from,
        this.favourite(activity),
      );
      if (spot === null) break;
      if (spot === 'HELD') return { kind: 'FAILED', activity, isHeld: true };
      const again = this.tooLate(activity, spot.stint.start);
      if (again) return again;
      const mark = journal.mark();
      this.place(activity, spot);
      const outcome = this.occupy(activity, spot);
      if (!outcome) return null;
      if (outcome.kind !== 'SHORT') {
        // What was placed here is rolled back with the list; until then AGAIN needs to know who placed it.
        if (outcome.kind === 'FAILED') journal.rollback(mark);
        return outcome;
      }
      journal.rollback(mark);
      if (outcome.until === Infinity) return { kind: 'FAILED', activity, isHeld: true };
      from = { at: wholeMinute(outcome.until), reason: outcome.reason };
    }
    return { kind: 'FAILED', activity, isHeld: false };
  }

  private favourite(activity: Activity): string | null {
    return this.preferred.get(activity.batchId) ?? null;
  }

  /** The earliest start that what comes before allows; null when something before it is not placed. */
  private bound(activity: Activity): { at: Instant; reason: Reason } | null {
    let at = this.problem.now;
    let reason: Reason = { code: 'NOW' };
    for (const link of activity.after) {
      const end = this.endOf([link.activity]);
      const before = this.graph.get(link.activity);
      if (end === null || !before) return null;
      const clear = wholeMinute(end + link.minMinutes * MINUTE_MS);
      if (clear <= at) continue;
      at = clear;
      const { step, piece } = link.wait ?? before;
      reason =
        link.wait !== null && link.minMinutes > 0
          ? {
              code: 'WAIT',
              at,
              wait: { batchId: activity.batchId, step, piece },
              hold: link.wait.hold,
            }
          : { code: 'PRECEDENCE', at, before: refTo(before) };
    }
    const shift = this.shifts.of(activity.id);
    if (shift && wholeMinute(shift.at) > at) {
      at = wholeMinute(shift.at);
      reason = { code: 'MAXIMUM', at, later: shift.later };
    }
    return { at, reason };
  }

  /** Where a start breaks a maximum wait: what to lay again, later; null when it keeps them, or nothing helps. */
  private tooLate(activity: Activity, start: Instant): Again | null {
    for (const link of activity.after) {
      const end = this.endOf([link.activity]);
      if (link.maxMinutes === null || end === null) continue;
      const overrun = start - end - link.maxMinutes * MINUTE_MS;
      if (overrun <= 0) continue;
      const before = this.placed.get(link.activity);
      // What has begun, or was laid before this list, stays where it is.
      if (!before || !this.placedBy.has(link.activity)) continue;
      if (this.shifts.shift(before, refTo(activity), overrun)) {
        return { kind: 'AGAIN', from: link.activity };
      }
    }
    return null;
  }

  private place(activity: Activity, { stint, reason }: Spot): void {
    const { journal, teams } = this.bookings;
    this.placed.set(activity.id, {
      ...nameOf(activity),
      start: stint.start,
      end: stint.end,
      segments: stint.segments,
      people: stint.team.people,
      clamps: [],
      reason: hoursReason(this.problem, stint, reason),
    });
    this.placedBy.set(activity.id, this.current);
    journal.note(() => {
      this.placed.delete(activity.id);
      this.placedBy.delete(activity.id);
    });
    teams.busy(stint.team.people, stint.segments);
  }

  /** Takes stations and clamps until they are given back, and lays whatever leads to that. */
  private occupy(activity: Activity, { stint }: Spot): Failure | Again | Short | null {
    const { bookings } = this;
    const { start } = stint;
    const until = [...activity.takes.map((take) => take.until), activity.clamps?.until ?? []];
    const undone = this.graph.upTo([...new Set(until.flat())], this.placed, false);
    const provisional = undone.some((next) => sharesResources(activity, next));
    const letGo = provisional ? this.holdForNow(activity, stint) : () => undefined;
    for (const next of undone) {
      const outcome = this.placed.has(next.id) ? null : this.put(next);
      if (outcome) return outcome;
    }
    letGo();
    for (const take of activity.takes) {
      const end = this.endOf(take.until);
      if (end === null) return { kind: 'FAILED', activity, isHeld: false };
      const short = bookings.stationShortUntil(activity, take, start, end);
      if (short !== null) {
        return {
          kind: 'SHORT',
          until: short,
          reason: stationReason(bookings, take.resource, short),
        };
      }
      bookings.holdStation(activity, take, start, end);
    }
    if (!activity.clamps) return null;
    const end = this.endOf(activity.clamps.until);
    if (end === null) return { kind: 'FAILED', activity, isHeld: false };
    const chosen = bookings.chooseClamps(activity.clamps, start, end);
    if ('shortUntil' in chosen) {
      const at = wholeMinute(chosen.shortUntil);
      return { kind: 'SHORT', until: at, reason: { code: 'CLAMPS', at, holders: [] } };
    }
    bookings.holdClamps(chosen.choice, start, end);
    const placement = this.placed.get(activity.id);
    if (placement) this.placed.set(activity.id, { ...placement, clamps: chosen.choice });
    return null;
  }

  /** Holds what an activity takes, without end where that is not known, while other work that needs the same is laid. */
  private holdForNow(
    activity: Activity,
    { start, end }: { start: Instant; end: Instant },
  ): () => void {
    const { bookings } = this;
    const lasts = (until: readonly string[]) => until.some((id) => id !== activity.id);
    const holds = activity.takes.map((take) => ({ take, to: lasts(take.until) ? Infinity : end }));
    const chosen = activity.clamps && bookings.chooseClamps(activity.clamps, start, end);
    const choice = chosen && 'choice' in chosen ? chosen.choice : [];
    const clampedTo = lasts(activity.clamps?.until ?? []) ? Infinity : end;
    for (const { take, to } of holds) bookings.holdStation(activity, take, start, to);
    bookings.holdClamps(choice, start, clampedTo);
    return () => {
      for (const { take, to } of holds) bookings.freeStation(activity, take, start, to);
      bookings.holdClamps(choice, start, clampedTo, -1);
    };
  }
}

function stationReason(bookings: Bookings, resource: string, until: number): Reason {
  const station = bookings.station(resource)?.of.station ?? resource;
  return { code: 'STATION', at: wholeMinute(until), station, holders: [] };
}

function sharesResources(a: Activity, b: Activity): boolean {
  return (
    (a.clamps !== null && b.clamps !== null) ||
    a.takes.some((take) => b.takes.some((other) => other.resource === take.resource))
  );
}

function refTo({ batchId, step, piece }: Activity) {
  return { batchId, step, piece };
}

function nameOf(activity: Activity) {
  return { activity: activity.id, ...refTo(activity) };
}

function wholeMinute(at: number): number {
  return Math.ceil(at / MINUTE_MS) * MINUTE_MS;
}
