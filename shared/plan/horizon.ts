import type { FloorBatch } from '#shared/floor/model';
import { piecesOf } from '#shared/floor/pieces';
import { standardMinutes } from '#shared/floor/progress';
import type { Hours } from '#shared/time/hours';

const SPARE_DAYS = 90;
const MOST_DAYS = 3 * 366;
const DAY_MINUTES = 24 * 60;

/**
 * How many days ahead to plan: all work done by one pair of hands, twice over, and the longest way through a batch's
 * waits. Generous, because it only costs calendar, and what lies beyond is not planned at all.
 */
export function horizonDays(batches: readonly FloorBatch[], hours: Hours): number {
  const weekMinutes = hours.weekly.flat().reduce((sum, { from, to }) => sum + to - from, 0);
  let work = 0;
  let longestWait = 0;
  for (const batch of batches) {
    let waits = 0;
    for (const step of batch.route.steps) {
      if (step.kind === 'WAIT') waits += step.minMinutes;
      else {
        work +=
          standardMinutes(batch, step) *
          piecesOf(batch, step.scope).length *
          Math.max(1, step.people);
      }
    }
    longestWait = Math.max(longestWait, waits);
  }
  const workDays = weekMinutes > 0 ? (2 * 7 * work) / weekMinutes : 0;
  return Math.min(MOST_DAYS, Math.ceil(SPARE_DAYS + workDays + longestWait / DAY_MINUTES));
}
