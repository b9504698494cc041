import type { FloorBatch, FloorShop, Occupation, Station } from '#shared/floor/model';
import { piecesOf, relatedPieces } from '#shared/floor/pieces';
import { runOf, standardMinutes, waitOn } from '#shared/floor/progress';
import { clampNeedOf, CLAMPS, releasingStep, stationUnits } from '#shared/floor/resources';
import { stepAt, type RouteStep, type WorkStep } from '#shared/route/route';
import {
  buildCalendar,
  endOfWorkOn,
  workingMinutesBetween,
  type Calendar,
} from '#shared/time/calendar';
import type { Hours, HoursException, WeeklyHours } from '#shared/time/hours';
import { DAY_MS, type Instant } from '#shared/time/instant';
import type { Activity, FactLink, Link, Need, OpenHold, Problem } from './model';

/** How far ahead is planned. */
const HORIZON_DAYS = 400;
/** Work that has taken longer than its standard time is expected to take this much more. */
const LEAST_LEFT_MINUTES = 5;

export interface PlanPerson {
  id: string;
  skills: readonly string[];
  /** Null: the shop's weekly hours. */
  weekly: WeeklyHours | null;
  exceptions: readonly HoursException[];
}

/** A shop as the planner gets it: plain data (with big integers for lengths), so that it crosses to a thread. */
export interface PlanInput {
  now: Instant;
  shop: FloorShop;
  hours: Hours;
  people: readonly PlanPerson[];
  /** Batches that have not left the shop. */
  batches: readonly FloorBatch[];
}

export function activityId(batchId: string, step: string, piece: number): string {
  return `${batchId}/${step}/${piece}`;
}

/** The id of the activity that stands for a batch's being ready. */
export function endId(batchId: string): string {
  return `${batchId}//0`;
}

/** Everything still to do in a shop, as a problem of activities, links, resources and people. */
export function buildProblem(input: PlanInput): Problem {
  const { now, shop, hours } = input;
  const horizonEnd = now + HORIZON_DAYS * DAY_MS;
  const shopCalendar = buildCalendar(hours, now - 32 * DAY_MS, horizonEnd);
  const open = input.batches.filter((batch) => batch.shippedAt === null);
  return {
    now,
    horizonEnd,
    activities: open.flatMap((batch) => activitiesOf(batch, shop, now, shopCalendar)),
    holds: open.flatMap((batch) => holdsOf(batch)),
    stations: shop.stations.map(({ key, name, capacity }) => ({ key, name, capacity })),
    clamps: shop.clamps,
    people: input.people.map((person) => ({
      id: person.id,
      skills: person.skills,
      calendar: buildCalendar(hoursOf(person, hours), now, horizonEnd),
    })),
    batches: open.map((batch) => ({
      id: batch.id,
      code: batch.code,
      shipBy: batch.shipBy,
      dueInstant: batch.shipBy === null ? null : endOfWorkOn(hours, batch.shipBy),
    })),
  };
}

/** A person's hours: their own week or the shop's; on the shop's dated exceptions the shop's rule, unless their own. */
function hoursOf(person: PlanPerson, shop: Hours): Hours {
  const own = new Set(person.exceptions.map((exception) => exception.date));
  return {
    zone: shop.zone,
    weekly: person.weekly ?? shop.weekly,
    exceptions: [
      ...person.exceptions,
      ...shop.exceptions.filter((exception) => !own.has(exception.date)),
    ],
  };
}

function activitiesOf(
  batch: FloorBatch,
  shop: FloorShop,
  now: Instant,
  shopCalendar: Calendar,
): Activity[] {
  const activities: Activity[] = [];
  batch.route.steps.forEach((step, index) => {
    if (step.kind !== 'WORK') return;
    for (const piece of piecesOf(batch, step.scope)) {
      const run = runOf(batch, step.key, piece);
      if (run?.finishedAt != null) continue;
      const startedAt = run?.startedAt ?? null;
      const standard = standardMinutes(batch, step);
      const spent = startedAt === null ? 0 : workingMinutesBetween(shopCalendar, startedAt, now);
      activities.push({
        id: activityId(batch.id, step.key, piece),
        batchId: batch.id,
        step: step.key,
        piece,
        name: step.name,
        minutes:
          startedAt === null ? standard : Math.max(LEAST_LEFT_MINUTES, Math.ceil(standard - spent)),
        pausable: startedAt !== null || step.pausable,
        people: step.people,
        skill: step.skill,
        needs: startedAt === null ? needsOf(batch, shop, step, piece) : [],
        // What is under way has everything before it behind it.
        ...(startedAt === null ? linksTo(batch, index, step, piece) : { links: [], facts: [] }),
        started: startedAt === null ? null : { at: startedAt, person: run?.startedBy ?? null },
        isEnd: false,
      });
    }
  });
  activities.push(endOf(batch));
  return activities;
}

function needsOf(batch: FloorBatch, shop: FloorShop, step: WorkStep, piece: number): Need[] {
  const needs: Need[] = [];
  const until = (key: string) => {
    const giver = stepAt(batch.route, key)?.step;
    const on = giver ? relatedPieces(batch, giver.scope, step.scope, piece).at(-1) : undefined;
    return activityId(batch.id, key, on ?? piece);
  };
  const station = (key: string, untilStep: string) => {
    const found = shop.stations.find((candidate): candidate is Station => candidate.key === key);
    if (!found) return;
    const units = stationUnits(found, batch, step.scope);
    needs.push({ kind: 'STATION', station: key, units, length: 0n, until: until(untilStep) });
  };
  for (const take of step.takes) {
    if (take.resource !== CLAMPS) station(take.resource, take.until);
    const need = take.resource === CLAMPS ? clampNeedOf(batch, step.scope) : null;
    if (!need || need.count === 0) continue;
    needs.push({
      kind: 'CLAMPS',
      station: '',
      units: need.count,
      length: need.length,
      until: until(take.until),
    });
  }
  const taken = step.takes.some((take) => take.resource === step.station);
  if (step.station !== null && !taken) station(step.station, step.key);
  return needs;
}

/** What has to come before a step on a piece: earlier work, and the waits in between. */
function linksTo(
  batch: FloorBatch,
  index: number,
  step: Pick<RouteStep, 'scope'>,
  piece: number,
): { links: Link[]; facts: FactLink[] } {
  const links: Link[] = [];
  const facts: FactLink[] = [];
  const earlier = batch.route.steps.slice(0, index);
  for (const [beforeIndex, before] of earlier.entries()) {
    const next = earlier.find((later, i) => i > beforeIndex && later.kind === 'WORK');
    for (const related of relatedPieces(batch, before.scope, step.scope, piece)) {
      if (before.kind === 'WORK') {
        const finishedAt = runOf(batch, before.key, related)?.finishedAt ?? null;
        if (finishedAt !== null) facts.push({ notBefore: finishedAt, notAfter: null, wait: null });
        else {
          const from = activityId(batch.id, before.key, related);
          links.push({ from, minMinutes: 0, maxMinutes: null, wait: null });
        }
        continue;
      }
      const wait = waitOn(batch, before, related);
      // A maximum counts for the work right after the wait only.
      const limits = next === undefined;
      if (wait) {
        const notAfter = limits ? wait.latestAt : null;
        facts.push({ notBefore: wait.clearAt, notAfter, wait: before.key });
        continue;
      }
      const source = stepAt(batch.route, before.after)?.step;
      if (!source) continue;
      for (const from of relatedPieces(batch, source.scope, before.scope, related)) {
        const finishedAt = runOf(batch, source.key, from)?.finishedAt ?? null;
        // The last piece of those it waits for is still to come: the minimum runs from there.
        if (finishedAt !== null) {
          const late = before.maxMinutes === null ? null : finishedAt + before.maxMinutes * 60_000;
          facts.push({ notBefore: finishedAt, notAfter: limits ? late : null, wait: before.key });
          continue;
        }
        links.push({
          from: activityId(batch.id, source.key, from),
          minMinutes: before.minMinutes,
          maxMinutes: limits ? before.maxMinutes : null,
          wait: before.key,
        });
      }
    }
  }
  return { links, facts };
}

function endOf(batch: FloorBatch): Activity {
  return {
    id: endId(batch.id),
    batchId: batch.id,
    step: '',
    piece: 0,
    name: 'ready',
    minutes: 0,
    pausable: true,
    people: 0,
    skill: null,
    needs: [],
    ...linksTo(batch, batch.route.steps.length, { scope: 'BATCH' }, 0),
    started: null,
    isEnd: true,
  };
}

function holdsOf(batch: FloorBatch): OpenHold[] {
  return batch.occupations
    .filter((occupation) => occupation.until === null)
    .flatMap((occupation: Occupation): OpenHold[] => {
      const taker = stepAt(batch.route, occupation.step)?.step;
      if (taker?.kind !== 'WORK') return [];
      const key = releasingStep(taker, occupation);
      const giver = stepAt(batch.route, key)?.step;
      if (!giver) return [];
      const pieces = relatedPieces(batch, giver.scope, taker.scope, occupation.piece);
      const left = pieces.filter((piece) => runOf(batch, key, piece)?.finishedAt == null);
      return [
        {
          kind: occupation.isClamps ? 'CLAMPS' : 'STATION',
          key: occupation.resource,
          batchId: batch.id,
          units: occupation.amount,
          until: activityId(batch.id, key, left.at(-1) ?? occupation.piece),
        },
      ];
    });
}
