import {
  buildCalendar,
  endOfWorkOn,
  nextOpen,
  workingDaysBetween,
  workingMinutesBetween,
  type Calendar,
} from '#shared/time/calendar';
import type { Hours } from '#shared/time/hours';
import { DAY_MS, MINUTE_MS, type Instant } from '#shared/time/instant';
import { toLocal } from '#shared/time/zone';
import type { Plan, PlanBatch, Problem } from './model';

/** When a batch is expected to be ready, and how that stands to its ship-by date. */
export interface Forecast {
  batchId: string;
  /** When all its work and waits are over. */
  readyAt: Instant;
  /** When its next work step that has not started begins; null when none is left. */
  nextStartAt: Instant | null;
  /**
   * Working minutes between being ready and the end of work on the ship-by date; negative when late (at least by one,
   * also when the shop is closed in between); null without a date.
   */
  slackMinutes: number | null;
  /**
   * Whole working days early (positive) or late (negative). Ready after the last open hour of a day counts as ready on
   * the next working day: nothing leaves before.
   */
  slackDays: number | null;
}

/** The forecasts of all batches that were planned, by batch. */
export function forecasts(problem: Problem, plan: Plan, hours: Hours): Map<string, Forecast> {
  const unplanned = new Set(plan.unplanned.map(({ batchId }) => batchId));
  const { ready, next } = endsOf(problem, plan);
  const instants = [...ready.values(), ...problem.batches.flatMap(({ dueAt }) => dueAt ?? [])];
  // Dates may lie far before now or beyond the horizon, outside the problem's own calendar.
  const calendar = buildCalendar(
    hours,
    instants.reduce((a, b) => Math.min(a, b), problem.now) - DAY_MS,
    instants.reduce((a, b) => Math.max(a, b), problem.horizonEnd) + DAY_MS,
  );
  return new Map(
    problem.batches
      .filter((batch) => !unplanned.has(batch.id))
      .map((batch) => {
        const readyAt = ready.get(batch.id) ?? problem.now;
        const slack = slackOf(batch, readyAt, calendar, hours);
        const nextStartAt = next.get(batch.id) ?? null;
        return [batch.id, { batchId: batch.id, readyAt, nextStartAt, ...slack }];
      }),
  );
}

function endsOf(
  problem: Problem,
  plan: Plan,
): { ready: Map<string, Instant>; next: Map<string, Instant> } {
  const placements = new Map(plan.placements.map((placement) => [placement.activity, placement]));
  const ends = new Map<string, Instant>();
  const ready = new Map<string, Instant>();
  const next = new Map<string, Instant>();
  const reach = (batchId: string, at: Instant) =>
    ready.set(batchId, Math.max(at, ready.get(batchId) ?? -Infinity));
  for (const { id, batchId, state } of problem.activities) {
    const placement = placements.get(id);
    const end = state.kind === 'DONE' ? state.finishedAt : placement?.end;
    if (end === undefined) continue;
    ends.set(id, end);
    reach(batchId, end);
    if (state.kind !== 'FREE' || !placement) continue;
    next.set(batchId, Math.min(placement.start, next.get(batchId) ?? Infinity));
  }
  for (const { id, tail } of problem.batches) {
    for (const link of tail) {
      const end = ends.get(link.activity);
      if (end !== undefined) reach(id, end + link.minMinutes * MINUTE_MS);
    }
  }
  return { ready, next };
}

function slackOf(
  { dueAt, shipBy }: PlanBatch,
  readyAt: Instant,
  calendar: Calendar,
  hours: Hours,
): { slackMinutes: number | null; slackDays: number | null } {
  if (dueAt === null || shipBy === null) return { slackMinutes: null, slackDays: null };
  const readyOn = toLocal(hours.zone, readyAt).date;
  const isAfterWork = readyAt > endOfWorkOn(hours, readyOn);
  const leaves = isAfterWork ? nextOpen(calendar, readyAt) : null;
  const leavesOn = leaves === null ? readyOn : toLocal(hours.zone, leaves).date;
  return {
    slackMinutes:
      readyAt > dueAt
        ? -Math.max(1, Math.ceil(workingMinutesBetween(calendar, dueAt, readyAt)))
        : Math.floor(workingMinutesBetween(calendar, readyAt, dueAt)),
    slackDays: workingDaysBetween(hours, leavesOn, shipBy),
  };
}
