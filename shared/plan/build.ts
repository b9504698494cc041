import type { FloorBatch } from '#shared/floor/model';
import { buildCalendar, endOfWorkOn, intersect, type Calendar } from '#shared/time/calendar';
import type { Hours } from '#shared/time/hours';
import { DAY_MS, MINUTE_MS, type Instant } from '#shared/time/instant';
import { activitiesOf } from './build-activities';
import { heldBy, stationsFor } from './build-resources';
import { BatchPieces } from './batch-pieces';
import { brokenStep, tailLinks } from './build-links';
import { horizonDays } from './horizon';
import type { Person, PlanBatch, Problem } from './model';
import type { PlanInput, PlanPerson } from './plan-input';

/** Work that started longer ago than this counts as if it had started then. */
const LOOK_BACK_MS = 30 * DAY_MS;

/**
 * The problem that a shop poses at a moment. Batches that have left are no part of it; those not yet let onto the floor
 * are planned from now on. The same shop in another order of batches or people poses the same problem.
 */
export function buildProblem(input: PlanInput): Problem {
  const now = Math.ceil(input.now / MINUTE_MS) * MINUTE_MS;
  const open = input.batches
    .filter((batch) => batch.shippedAt === null)
    .sort((a, b) => compareText(a.code, b.code) || compareText(a.id, b.id));
  const horizonEnd = now + horizonDays(open, input.hours) * DAY_MS;
  const from = firstNeeded(open, now);
  const shop = buildCalendar(input.hours, from, horizonEnd);
  const people = peopleOf(input, shop, from, horizonEnd);
  const calendarOf = (id: string | null) =>
    people.find((person) => person.id === id)?.calendar ?? shop;
  const pieces = open.map((batch) => new BatchPieces(batch));
  return {
    now,
    horizonEnd,
    shop,
    people,
    stations: stationsFor(input.shop, pieces),
    clamps: [...input.shop.clamps].sort((a, b) => compareText(a.key, b.key)),
    activities: pieces.flatMap((of) =>
      activitiesOf(
        of,
        input.shop,
        people.map(({ id }) => id),
        now,
        calendarOf,
      ),
    ),
    held: pieces.flatMap((of) => heldBy(of, input.shop, now)),
    batches: batchesOf(pieces, input, now),
  };
}

function batchesOf(pieces: readonly BatchPieces[], input: PlanInput, now: Instant): PlanBatch[] {
  const unranked = pieces.map((of) => ({
    id: of.batch.id,
    code: of.batch.code,
    shipBy: of.batch.shipBy,
    dueAt: of.batch.shipBy === null ? null : endOfWorkOn(input.hours, of.batch.shipBy),
    weight: 1,
    preferred: of.batch.assignedTo,
    brokenStep: brokenStep(of),
    tail: tailLinks(of, now),
    hasBegun: of.batch.runs.some((run) => run.startedAt !== null),
  }));
  const ranks = [...unranked]
    .sort(
      (a, b) =>
        compareNumbers(a.dueAt ?? Infinity, b.dueAt ?? Infinity) ||
        Number(b.hasBegun) - Number(a.hasBegun) ||
        compareText(a.code, b.code) ||
        compareText(a.id, b.id),
    )
    .map(({ id }) => id);
  const priority = new Map(ranks.map((id, rank) => [id, rank]));
  return unranked.map(({ hasBegun: _hasBegun, ...batch }) => ({
    ...batch,
    priority: priority.get(batch.id) ?? 0,
  }));
}

function peopleOf(input: PlanInput, shop: Calendar, from: Instant, to: Instant): Person[] {
  const calendarOf = (person: PlanPerson) => {
    if (person.weekly === null && person.exceptions.length === 0) return shop;
    return intersect(shop, buildCalendar(hoursOf(person, input.hours), from, to));
  };
  return input.people
    .map((person) => ({
      id: person.id,
      skills: [...person.skills].sort(compareText),
      calendar: calendarOf(person),
    }))
    .sort((a, b) => compareText(a.id, b.id));
}

/** A person's own hours. Who has no week of their own has the shop's, with the shop's dated exceptions. */
function hoursOf(person: PlanPerson, shop: Hours): Hours {
  if (person.weekly !== null) {
    return { zone: shop.zone, weekly: person.weekly, exceptions: person.exceptions };
  }
  const own = new Set(person.exceptions.map(({ date }) => date));
  const shops = shop.exceptions.filter(({ date }) => !own.has(date));
  return { zone: shop.zone, weekly: shop.weekly, exceptions: [...person.exceptions, ...shops] };
}

function firstNeeded(batches: readonly FloorBatch[], now: Instant): Instant {
  let first = now;
  for (const { runs } of batches) {
    for (const run of runs) {
      if (run.startedAt !== null && run.finishedAt === null) first = Math.min(first, run.startedAt);
    }
  }
  return Math.max(first, now - LOOK_BACK_MS);
}

function compareText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

/** Infinity less Infinity is no number, so that a difference will not do. */
function compareNumbers(a: number, b: number): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
