import type { StepRun } from '#shared/floor/model';
import { standardMinutes } from '#shared/floor/progress';
import { workingMinutesBetween, type Calendar } from '#shared/time/calendar';
import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { WorkStep } from '#shared/route/route';
import type { BatchPieces } from './batch-pieces';

/**
 * Working minutes left on each piece of a step that has started and not finished, at least 1. Pieces that one person has
 * started are counted as done one after another: their minutes run from the first start, or from the last finish since.
 */
export function minutesLeft(
  of: BatchPieces,
  step: WorkStep,
  now: Instant,
  calendarOf: (person: string | null) => Calendar,
): Map<number, number> {
  const left = new Map<number, number>();
  const runs = of.batch.runs.filter((run) => run.step === step.key && run.startedAt !== null);
  const unfinished = runs.filter((run) => run.finishedAt === null);
  for (const person of new Set(unfinished.map((run) => run.startedBy))) {
    const open = unfinished.filter((run) => run.startedBy === person);
    open.sort((a, b) => (a.startedAt ?? 0) - (b.startedAt ?? 0) || a.piece - b.piece);
    const since = Math.max(open[0]?.startedAt ?? now, lastFinish(runs, person));
    const elapsed = step.pausable
      ? workingMinutesBetween(calendarOf(person), since, now)
      : Math.max(0, now - since) / MINUTE_MS;
    open.forEach((run, i) => {
      const expected = standardMinutes(of.batch, step) * (i + 1);
      left.set(run.piece, Math.max(1, Math.ceil(expected - elapsed)));
    });
  }
  return left;
}

function lastFinish(runs: readonly StepRun[], person: string | null): Instant {
  return runs
    .filter((run) => run.startedBy === person)
    .reduce((last, run) => Math.max(last, run.finishedAt ?? -Infinity), -Infinity);
}
