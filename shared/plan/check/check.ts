import type { Calendar } from '#shared/time/calendar';
import type { Instant } from '#shared/time/instant';
import type { Activity, Need, Placement, Plan, Problem } from '../model';

const MINUTE = 60_000;

/** A rule that a plan breaks. */
export interface Violation {
  rule:
    | 'PLACED_ONCE'
    | 'NOT_BEFORE_NOW'
    | 'DURATION'
    | 'WHOLE_SPAN'
    | 'ORDER'
    | 'MINIMUM'
    | 'MAXIMUM'
    | 'PEOPLE'
    | 'SKILL'
    | 'PERSON_TWICE'
    | 'STATION'
    | 'CLAMPS';
  activity: string;
  detail: string;
}

/** Every rule that a plan breaks, worked out from the problem alone: this file shares only the model with the planner. */
export function checkPlan(problem: Problem, plan: Plan): Violation[] {
  const found: Violation[] = [];
  const say = (rule: Violation['rule'], activity: string, detail: string) =>
    found.push({ rule, activity, detail });
  const excused = new Set(plan.unplanned.map((each) => each.batchId));
  const placements = new Map<string, Placement>();
  for (const placement of plan.placements) {
    if (placements.has(placement.activity)) say('PLACED_ONCE', placement.activity, 'twice');
    placements.set(placement.activity, placement);
  }
  const known = new Map(problem.activities.map((activity) => [activity.id, activity]));
  for (const id of placements.keys()) {
    if (!known.has(id)) say('PLACED_ONCE', id, 'not in the problem');
  }
  for (const activity of problem.activities) {
    const placement = placements.get(activity.id);
    if (!placement) {
      if (!excused.has(activity.batchId)) say('PLACED_ONCE', activity.id, 'missing');
      continue;
    }
    checkTime(problem, activity, placement, say);
    checkOrder(plan, activity, placement, placements, say);
    checkCrew(problem, activity, placement, say);
  }
  checkPeople(problem, plan, known, say);
  checkStations(problem, known, placements, say);
  checkClamps(problem, known, placements, say);
  return found;
}

type Say = (rule: Violation['rule'], activity: string, detail: string) => void;

function checkTime(problem: Problem, activity: Activity, placement: Placement, say: Say): void {
  const { start, end } = placement;
  if (!(start <= end)) say('DURATION', activity.id, 'ends before it starts');
  if (start < problem.now && !activity.isEnd) say('NOT_BEFORE_NOW', activity.id, 'in the past');
  if (activity.isEnd) {
    if (end !== start) say('DURATION', activity.id, 'being ready takes no time');
    return;
  }
  const calendars = placement.people.flatMap(
    (id) => problem.people.find((person) => person.id === id)?.calendar ?? [],
  );
  const worked = commonTime(calendars, start, end);
  if (Math.abs(worked - activity.minutes * MINUTE) > 1) {
    say('DURATION', activity.id, `${worked / MINUTE} min of work instead of ${activity.minutes}`);
  }
  if (calendars.some((calendar) => !openAt(calendar, start))) {
    say('DURATION', activity.id, 'starts in closed hours');
  }
  if (!activity.pausable && end - start !== worked) {
    say('WHOLE_SPAN', activity.id, 'is interrupted');
  }
}

function checkOrder(
  plan: Plan,
  activity: Activity,
  placement: Placement,
  placements: ReadonlyMap<string, Placement>,
  say: Say,
): void {
  const admitted = plan.missedMaxima.find((missed) => missed.activity === activity.id);
  const latest = (limit: Instant) => limit + (admitted ? admitted.lateMinutes * MINUTE : 0);
  for (const fact of activity.facts) {
    if (placement.start < fact.notBefore) say('MINIMUM', activity.id, 'before a hold clears');
    if (fact.notAfter !== null && placement.start > latest(fact.notAfter)) {
      say('MAXIMUM', activity.id, 'after a maximum wait');
    }
  }
  for (const link of activity.links) {
    const before = placements.get(link.from);
    if (!before) {
      say('ORDER', activity.id, `${link.from} is not placed`);
      continue;
    }
    if (placement.start < before.end) say('ORDER', activity.id, `before ${link.from} has ended`);
    if (placement.start < before.end + link.minMinutes * MINUTE) {
      say('MINIMUM', activity.id, `too soon after ${link.from}`);
    }
    const { maxMinutes } = link;
    if (maxMinutes !== null && placement.start > latest(before.end + maxMinutes * MINUTE)) {
      say('MAXIMUM', activity.id, `too late after ${link.from}`);
    }
  }
}

function checkCrew(problem: Problem, activity: Activity, placement: Placement, say: Say): void {
  if (new Set(placement.people).size !== activity.people) {
    say('PEOPLE', activity.id, `${placement.people.length} people instead of ${activity.people}`);
  }
  for (const id of placement.people) {
    const person = problem.people.find((candidate) => candidate.id === id);
    if (!person) say('PEOPLE', activity.id, 'someone who is not of the shop');
    else if (
      activity.skill !== null &&
      !person.skills.includes(activity.skill) &&
      activity.started?.person !== id
    ) {
      say('SKILL', activity.id, `lacks ${activity.skill}`);
    }
  }
}

function checkPeople(
  problem: Problem,
  plan: Plan,
  known: ReadonlyMap<string, Activity>,
  say: Say,
): void {
  for (const person of problem.people) {
    const theirs = plan.placements
      .filter((placement) => placement.people.includes(person.id) && known.has(placement.activity))
      .sort((a, b) => a.start - b.start || a.end - b.end);
    for (let i = 1; i < theirs.length; i++) {
      const [before, after] = [theirs[i - 1], theirs[i]];
      if (before && after && after.start < before.end) {
        say('PERSON_TWICE', after.activity, `overlaps ${before.activity}`);
      }
    }
  }
}

interface Use {
  start: Instant;
  end: Instant;
  units: number;
  activity: string;
}

function checkStations(
  problem: Problem,
  known: ReadonlyMap<string, Activity>,
  placements: ReadonlyMap<string, Placement>,
  say: Say,
): void {
  for (const station of problem.stations) {
    const uses = openUses(problem, placements, 'STATION', station.key);
    for (const [activity, need, start, end] of placedNeeds(known, placements)) {
      if (need.kind !== 'STATION' || need.station !== station.key) continue;
      uses.push({ start, end, units: need.units, activity: activity.id });
    }
    sweep(uses, station.capacity, (activity, level) =>
      say('STATION', activity, `${station.key}: ${level} of ${station.capacity}`),
    );
  }
}

function checkClamps(
  problem: Problem,
  known: ReadonlyMap<string, Activity>,
  placements: ReadonlyMap<string, Placement>,
  say: Say,
): void {
  for (const [activity, need] of placedNeeds(known, placements)) {
    if (need.kind !== 'CLAMPS') continue;
    const taken = placements.get(activity.id)?.clamps ?? [];
    const sum = taken.reduce((total, each) => total + each.units, 0);
    if (sum !== need.units) say('CLAMPS', activity.id, `${sum} clamps instead of ${need.units}`);
    for (const { key } of taken) {
      const clamp = problem.clamps.find((candidate) => candidate.key === key);
      if (!clamp || clamp.length < need.length) say('CLAMPS', activity.id, `${key} is too short`);
    }
  }
  for (const clamp of problem.clamps) {
    const uses = openUses(problem, placements, 'CLAMPS', clamp.key);
    for (const [activity, need, start, end] of placedNeeds(known, placements)) {
      if (need.kind !== 'CLAMPS') continue;
      const units = (placements.get(activity.id)?.clamps ?? [])
        .filter((each) => each.key === clamp.key)
        .reduce((total, each) => total + each.units, 0);
      if (units > 0) uses.push({ start, end, units, activity: activity.id });
    }
    sweep(uses, clamp.count, (activity, level) =>
      say('CLAMPS', activity, `${clamp.key}: ${level} of ${clamp.count}`),
    );
  }
}

/** What is occupied now, until the activity that gives it back has ended. */
function openUses(
  problem: Problem,
  placements: ReadonlyMap<string, Placement>,
  kind: 'STATION' | 'CLAMPS',
  key: string,
): Use[] {
  return problem.holds
    .filter((hold) => hold.kind === kind && hold.key === key)
    .map((hold) => ({
      start: problem.now,
      end: placements.get(hold.until)?.end ?? problem.horizonEnd,
      units: hold.units,
      activity: hold.until,
    }));
}

function* placedNeeds(
  known: ReadonlyMap<string, Activity>,
  placements: ReadonlyMap<string, Placement>,
): Generator<[Activity, Need, Instant, Instant]> {
  for (const [id, placement] of placements) {
    const activity = known.get(id);
    for (const need of activity?.needs ?? []) {
      const end = placements.get(need.until)?.end ?? placement.end;
      if (activity) yield [activity, need, placement.start, end];
    }
  }
}

/** Calls back where uses together exceed a capacity. What is over already at the start of the plan is a fact. */
function sweep(
  uses: readonly Use[],
  capacity: number,
  over: (activity: string, level: number) => void,
) {
  const marks = uses
    .filter((use) => use.start < use.end)
    .flatMap((use) => [
      { at: use.start, units: use.units, use },
      { at: use.end, units: -use.units, use },
    ])
    .sort((a, b) => a.at - b.at || a.units - b.units);
  let level = 0;
  for (const mark of marks) {
    level += mark.units;
    if (mark.units > 0 && level > capacity) over(mark.use.activity, level);
  }
}

/** Milliseconds in [start, end) that all calendars have in common. */
function commonTime(calendars: readonly Calendar[], start: Instant, end: Instant): number {
  const [first, ...others] = calendars;
  if (!first) return end - start;
  let sum = 0;
  for (let i = 0; i < first.starts.length; i++) {
    const from = Math.max(start, first.starts[i] ?? Infinity);
    const to = Math.min(end, first.ends[i] ?? -Infinity);
    if (from < to) sum += others.length === 0 ? to - from : commonTime(others, from, to);
  }
  return sum;
}

function openAt(calendar: Calendar, at: Instant): boolean {
  return calendar.starts.some((start, i) => start <= at && at < (calendar.ends[i] ?? start));
}
