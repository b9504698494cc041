import { MINUTE_MS, type Instant } from '#shared/time/instant';
import { Ledger, type Slot } from './ledger';
import type { Activity, Need, Placement, Plan, Problem, Reason, UnplannedReason } from './model';

/** How often a batch is laid anew with an earlier step moved later, so that a maximum wait is kept. */
const MOST_REDOS = 200;
/** How often the start of an occupation is moved on. */
const MOST_MOVES = 2_000;

/**
 * A first plan by one forward pass: work under way goes on, what holds clamps and racks now is let go first, then batch
 * by batch in the order of their dates, each step at its earliest. Right rather than clever: every rule is kept, dates
 * are met as they come. Where a maximum wait would be missed, the step before it is moved later; where even that does
 * not help, the plan says by how much it is missed.
 */
export function planForward(problem: Problem): Plan {
  return new ForwardPass(problem).run();
}

/** A booking that can be taken back. */
interface Booking {
  undo(): void;
}

class ForwardPass {
  private readonly ledger: Ledger;
  private readonly byId: Map<string, Activity>;
  private readonly placed = new Map<string, Placement>();
  /** Starts that were moved later for the sake of a maximum wait further on. */
  private readonly notBefore = new Map<string, Instant>();
  private readonly unplanned: Plan['unplanned'] = [];
  private journal: Booking[] = [];
  /** Occupations of now whose end is not known yet. */
  private readonly openHolds: {
    until: string;
    end(at: Instant): void;
    reopen(at: Instant): void;
  }[] = [];

  constructor(private readonly problem: Problem) {
    this.ledger = new Ledger(problem);
    this.byId = new Map(problem.activities.map((activity) => [activity.id, activity]));
  }

  run(): Plan {
    const { activities, batches } = this.problem;
    const impossible = new Map(
      activities.flatMap((activity) => {
        const reason = impossibility(this.problem, this.ledger, activity);
        return reason ? [[activity.batchId, reason] as const] : [];
      }),
    );
    for (const [batchId, reason] of impossible) this.unplanned.push({ batchId, reason });
    this.bookHolds();
    for (const activity of activities) {
      if (activity.started && !impossible.has(activity.batchId)) this.place(activity);
    }
    const urgent = this.problem.holds
      .map((hold) => this.byId.get(hold.until))
      .filter((activity): activity is Activity => activity !== undefined)
      .filter((activity) => !impossible.has(activity.batchId));
    for (const activity of urgent) this.placeWithBefore(activity);
    const byBatch = new Map<string, Activity[]>();
    for (const activity of activities) {
      const list = byBatch.get(activity.batchId);
      if (list) list.push(activity);
      else byBatch.set(activity.batchId, [activity]);
    }
    const order = [...batches].sort(
      (a, b) =>
        (a.dueInstant ?? Infinity) - (b.dueInstant ?? Infinity) || (a.code < b.code ? -1 : 1),
    );
    for (const batch of order) {
      if (impossible.has(batch.id)) continue;
      this.layBatch(byBatch.get(batch.id) ?? []);
    }
    return {
      placements: [...this.placed.values()].sort(
        (a, b) => a.start - b.start || (a.activity < b.activity ? -1 : 1),
      ),
      unplanned: this.unplanned,
      missedMaxima: this.missedMaxima(),
    };
  }

  private bookHolds(): void {
    const { now, horizonEnd } = this.problem;
    for (const hold of this.problem.holds) {
      const add = (start: Instant, end: Instant, units: number) =>
        hold.kind === 'CLAMPS'
          ? this.ledger.bookClamps(hold.key, start, end, units)
          : this.ledger.bookStation(hold.key, start, end, units);
      add(now, horizonEnd, hold.units);
      this.openHolds.push({
        until: hold.until,
        end: (at) => add(at, horizonEnd, -hold.units),
        reopen: (at) => add(at, horizonEnd, hold.units),
      });
    }
  }

  /** Lays all of a batch, anew where a maximum wait asks for a later start of something before it. */
  private layBatch(activities: readonly Activity[]): void {
    for (let redo = 0; redo < MOST_REDOS; redo++) {
      const mark = this.journal.length;
      const late = this.layOnce(activities, redo === MOST_REDOS - 1);
      if (late === null) return;
      this.undoTo(mark);
    }
  }

  /** Null when all is placed as well as it can be; else a start was moved later and the batch has to be laid again. */
  private layOnce(activities: readonly Activity[], acceptLate: boolean): true | null {
    const mark = this.journal.length;
    for (const activity of activities) {
      if (this.placed.has(activity.id)) continue;
      if (!this.place(activity)) {
        this.unplanned.push({
          batchId: activity.batchId,
          reason: { code: 'NO_SPAN', step: activity.name, minutes: activity.minutes },
        });
        this.undoTo(mark);
        return null;
      }
      const late = this.lateBy(activity);
      if (!late) continue;
      const moved = !acceptLate && late.from !== null && this.placed.get(late.from);
      if (moved && !this.byId.get(moved.activity)?.started) {
        const to = moved.start + late.milliseconds;
        this.notBefore.set(moved.activity, Math.max(to, this.notBefore.get(moved.activity) ?? 0));
        return true;
      }
    }
    return null;
  }

  /** Maxima that no order of the work could keep, with how late the work after them starts. */
  private missedMaxima(): Plan['missedMaxima'] {
    return this.problem.activities.flatMap((activity) => {
      const late = this.placed.has(activity.id) ? this.lateBy(activity) : null;
      if (!late) return [];
      const lateMinutes = Math.ceil(late.milliseconds / MINUTE_MS);
      return [{ activity: activity.id, wait: late.wait, lateMinutes }];
    });
  }

  /** How much later than a maximum allows an activity starts, and the activity to move for it (null: a fact). */
  private lateBy(
    activity: Activity,
  ): { milliseconds: number; from: string | null; wait: string | null } | null {
    const start = this.placed.get(activity.id)?.start ?? 0;
    let worst: { milliseconds: number; from: string | null; wait: string | null } | null = null;
    for (const link of activity.links) {
      const before = this.placed.get(link.from);
      if (link.maxMinutes === null || !before) continue;
      const milliseconds = start - before.end - link.maxMinutes * MINUTE_MS;
      if (milliseconds > (worst?.milliseconds ?? 0)) {
        worst = { milliseconds, from: link.from, wait: link.wait };
      }
    }
    for (const fact of activity.facts) {
      if (fact.notAfter === null) continue;
      const milliseconds = start - fact.notAfter;
      if (milliseconds > (worst?.milliseconds ?? 0)) {
        worst = { milliseconds, from: null, wait: fact.wait };
      }
    }
    return worst;
  }

  private placeWithBefore(activity: Activity): void {
    for (const before of this.unplacedBefore(activity)) {
      if (!this.placed.has(before.id)) this.place(before);
    }
    if (!this.placed.has(activity.id)) this.place(activity);
  }

  /** What has to be placed before an activity, in the order of the route. */
  private unplacedBefore(activity: Activity): Activity[] {
    const wanted = new Set<string>();
    const visit = (each: Activity) => {
      for (const { from } of each.links) {
        const before = this.byId.get(from);
        if (!before || wanted.has(from) || this.placed.has(from)) continue;
        visit(before);
        wanted.add(from);
      }
    };
    visit(activity);
    return [...wanted].flatMap((id) => this.byId.get(id) ?? []);
  }

  /**
   * Places an activity at its earliest, with everything up to the end of what it keeps occupied: clamps are counted from
   * spreading until somebody can take them off. False when there is no place before the horizon.
   */
  private place(activity: Activity): boolean {
    const mark = this.journal.length;
    let { at, reason } = this.earliest(activity);
    for (let moves = 0; moves < MOST_MOVES; moves++) {
      const slot = this.slotOf(activity, at);
      if (!slot) break;
      this.put(activity, slot, slot.reason ?? reason);
      const next = this.occupy(activity, slot);
      if (next === true) return true;
      this.undoTo(mark);
      if (next === null) break;
      at = Math.max(next.at, at + MINUTE_MS);
      reason = next.reason;
    }
    this.undoTo(mark);
    return false;
  }

  private slotOf(activity: Activity, at: Instant): Slot | null {
    if (activity.isEnd) return { start: at, end: at, people: [], reason: null };
    // Work under way goes on with the one who began it, if they are still of the shop.
    const person = activity.started?.person ?? null;
    return (
      (person === null ? null : this.ledger.slotOfPerson(activity, person, at)) ??
      this.ledger.slot(activity, at)
    );
  }

  /** The earliest start that order and waits allow, on whole minutes. */
  private earliest(activity: Activity): { at: Instant; reason: Reason } {
    // Being ready is no work: it may have come about before now.
    let at = activity.isEnd && activity.links.length === 0 ? 0 : this.problem.now;
    let reason: Reason = { code: 'NOW' };
    for (const fact of activity.facts) {
      if (fact.notBefore <= at) continue;
      at = fact.notBefore;
      reason = fact.wait === null ? reason : { code: 'WAIT', wait: fact.wait, until: at };
    }
    for (const link of activity.links) {
      const before = this.placed.get(link.from);
      if (!before) continue;
      const from = before.end + link.minMinutes * MINUTE_MS;
      if (from <= at) continue;
      at = from;
      reason =
        link.wait !== null && link.minMinutes > 0
          ? { code: 'WAIT', wait: link.wait, until: at }
          : { code: 'AFTER', activity: link.from };
    }
    const moved = this.notBefore.get(activity.id) ?? 0;
    if (moved > at) return { at: wholeMinute(moved), reason: { code: 'FRESH' } };
    return { at: activity.isEnd ? at : wholeMinute(at), reason };
  }

  /** Books what an activity occupies; else says from when to try again. */
  private occupy(activity: Activity, slot: Slot): true | { at: Instant; reason: Reason } | null {
    for (const need of activity.needs) {
      const end = this.endOfNeed(activity, need, slot);
      if (end === null) return null;
      if (need.kind === 'STATION') {
        const room = this.ledger.stationRoom(need.station, slot.start, end, need.units);
        if (room === null) return null;
        if (room !== true) return { at: room, reason: { code: 'STATION', station: need.station } };
        this.ledger.bookStation(need.station, slot.start, end, need.units);
        this.note(() => this.ledger.bookStation(need.station, slot.start, end, -need.units));
        continue;
      }
      const room = this.ledger.clampRoom(need.length, need.units, slot.start, end);
      if (room === null) return null;
      if (!Array.isArray(room)) return { at: room, reason: { code: 'CLAMPS' } };
      for (const { key, units } of room) {
        this.ledger.bookClamps(key, slot.start, end, units);
        this.note(() => this.ledger.bookClamps(key, slot.start, end, -units));
      }
      const placement = this.placed.get(activity.id);
      if (placement) placement.clamps = room;
    }
    return true;
  }

  /** When a need ends: the end of the activity that gives it back, which is placed for that. */
  private endOfNeed(activity: Activity, need: Need, slot: Slot): Instant | null {
    if (need.until === activity.id) return slot.end;
    const giver = this.byId.get(need.until);
    if (!giver) return slot.end;
    for (const before of this.unplacedBefore(giver)) {
      if (!this.placed.has(before.id) && !this.place(before)) return null;
    }
    if (!this.placed.has(giver.id) && !this.place(giver)) return null;
    return this.placed.get(giver.id)?.end ?? null;
  }

  private put(activity: Activity, slot: Slot, reason: Reason): void {
    const { start, end, people } = slot;
    this.placed.set(activity.id, { activity: activity.id, start, end, people, clamps: [], reason });
    for (const id of people) this.ledger.bookPerson(id, start, end);
    this.note(() => {
      this.placed.delete(activity.id);
      for (const id of people) this.ledger.bookPerson(id, start, end, -1);
    });
    for (const hold of this.openHolds) {
      if (hold.until !== activity.id) continue;
      hold.end(end);
      this.note(() => hold.reopen(end));
    }
  }

  private note(undo: () => void): void {
    this.journal.push({ undo });
  }

  private undoTo(mark: number): void {
    while (this.journal.length > mark) this.journal.pop()?.undo();
  }
}

function wholeMinute(at: Instant): Instant {
  return Math.ceil(at / MINUTE_MS) * MINUTE_MS;
}

/** What makes an activity impossible in this shop whatever the order, or null. */
function impossibility(
  problem: Problem,
  ledger: Ledger,
  activity: Activity,
): UnplannedReason | null {
  if (activity.isEnd || activity.started) return null;
  const { name: step, skill, people, minutes } = activity;
  if (ledger.crews(activity).length === 0) return { code: 'NO_PERSON', step, skill, people };
  for (const need of activity.needs) {
    if (need.kind === 'CLAMPS') {
      const owned = problem.clamps
        .filter((clamp) => clamp.length >= need.length)
        .reduce((sum, clamp) => sum + clamp.count, 0);
      if (owned < need.units) return { code: 'TOO_FEW_CLAMPS', step, needed: need.units, owned };
      continue;
    }
    const station = problem.stations.find((candidate) => candidate.key === need.station);
    if (station && station.capacity < need.units) {
      return {
        code: 'STATION_TOO_SMALL',
        step,
        station: station.name,
        needed: need.units,
        capacity: station.capacity,
      };
    }
  }
  return ledger.slotIfAlone(activity) ? null : { code: 'NO_SPAN', step, minutes };
}
