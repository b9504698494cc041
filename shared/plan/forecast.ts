import { buildCalendar, workingDaysBetween, workingMinutesBetween } from '#shared/time/calendar';
import type { Hours } from '#shared/time/hours';
import { DAY_MS, type Instant } from '#shared/time/instant';
import { toLocal } from '#shared/time/zone';
import { endId } from './build';
import type { Plan, Problem } from './model';

/** When a batch is expected to be ready, and how that stands to its ship-by date. */
export interface Forecast {
  batchId: string;
  readyAt: Instant;
  /** When its next work step that has not started begins; null when none is left. */
  nextStartAt: Instant | null;
  /** Working minutes between being ready and the end of work on the ship-by date; negative when late. */
  slackMinutes: number | null;
  /** Whole working days early (positive) or late (negative). */
  slackDays: number | null;
}

/** The forecasts of all batches that were planned. */
export function forecasts(problem: Problem, plan: Plan, hours: Hours): Forecast[] {
  const byId = new Map(plan.placements.map((placement) => [placement.activity, placement]));
  const next = new Map<string, Instant>();
  for (const activity of problem.activities) {
    if (activity.isEnd || activity.started) continue;
    const start = byId.get(activity.id)?.start;
    if (start === undefined) continue;
    next.set(activity.batchId, Math.min(start, next.get(activity.batchId) ?? Infinity));
  }
  const dues = problem.batches.flatMap((batch) => batch.dueInstant ?? []);
  const calendar = buildCalendar(
    hours,
    Math.min(problem.now, ...dues) - DAY_MS,
    problem.horizonEnd + DAY_MS,
  );
  return problem.batches.flatMap((batch) => {
    const readyAt = byId.get(endId(batch.id))?.end;
    if (readyAt === undefined) return [];
    const { dueInstant, shipBy } = batch;
    const late = dueInstant !== null && readyAt > dueInstant;
    return {
      batchId: batch.id,
      readyAt,
      nextStartAt: next.get(batch.id) ?? null,
      slackMinutes:
        dueInstant === null
          ? null
          : Math.round(
              late
                ? -workingMinutesBetween(calendar, dueInstant, readyAt)
                : workingMinutesBetween(calendar, readyAt, dueInstant),
            ),
      slackDays:
        shipBy === null
          ? null
          : workingDaysBetween(hours, toLocal(hours.zone, readyAt).date, shipBy),
    };
  });
}
