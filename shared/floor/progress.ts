import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { FloorBatch, Hold, StepRun } from './model';
import { piecesOf, relatedPieces } from './pieces';
import type { Place, RouteStep, StepScope, WaitStep, WorkStep } from '#shared/route/route';

const runIndex = new WeakMap<FloorBatch, Map<string, StepRun>>();

/** The run of a step on a piece, or null when nobody has touched it. */
export function runOf(batch: FloorBatch, step: string, piece: number): StepRun | null {
  let index = runIndex.get(batch);
  if (!index) {
    index = new Map(batch.runs.map((run) => [`${run.step}/${run.piece}`, run]));
    runIndex.set(batch, index);
  }
  return index.get(`${step}/${piece}`) ?? null;
}

/** A wait on one piece once it has begun: since when, until when, and when the next step comes too late. */
export interface BegunWait {
  since: Instant;
  /** When it clears: its minimum, or the moment an override cut it. */
  clearAt: Instant;
  latestAt: Instant | null;
  cut: boolean;
}

/**
 * The wait on a piece, or null when it has not begun. Its minimum counts from the last of the pieces it waits for, its
 * maximum from the first: the first face planed is the first to go stale.
 */
export function waitOn(batch: FloorBatch, wait: WaitStep, piece: number): BegunWait | null {
  const from = batch.route.steps.find((step) => step.key === wait.after);
  if (!from) return null;
  let first = Infinity;
  let last = -Infinity;
  for (const related of relatedPieces(batch, from.scope, wait.scope, piece)) {
    const finishedAt = runOf(batch, from.key, related)?.finishedAt ?? null;
    if (finishedAt === null) return null;
    first = Math.min(first, finishedAt);
    last = Math.max(last, finishedAt);
  }
  const cutAt = runOf(batch, wait.key, piece)?.cutAt ?? null;
  const minimum = last + wait.minMinutes * MINUTE_MS;
  return {
    since: last,
    clearAt: cutAt === null ? minimum : Math.min(cutAt, minimum),
    latestAt: wait.maxMinutes === null ? null : first + wait.maxMinutes * MINUTE_MS,
    cut: cutAt !== null,
  };
}

/** Whether a step is done on a piece at an instant: finished work, or a wait that has cleared. */
export function isDone(batch: FloorBatch, step: RouteStep, piece: number, at: Instant): boolean {
  if (step.kind === 'WORK') {
    const finishedAt = runOf(batch, step.key, piece)?.finishedAt ?? null;
    return finishedAt !== null && finishedAt <= at;
  }
  const wait = waitOn(batch, step, piece);
  return wait !== null && wait.clearAt <= at;
}

/**
 * How far each piece has come: by scope and piece, the index of its first step of that scope that is not done. Kept for
 * the last instant asked, since a card asks many times for one.
 */
function frontierOf(batch: FloorBatch, at: Instant): Map<string, number> {
  const kept = frontiers.get(batch);
  if (kept?.at === at) return kept.first;
  const first = new Map<string, number>();
  batch.route.steps.forEach((step, index) => {
    for (const piece of piecesOf(batch, step.scope)) {
      const key = `${step.scope}/${piece}`;
      if (!first.has(key) && !isDone(batch, step, piece, at)) first.set(key, index);
    }
  });
  frontiers.set(batch, { at, first });
  return first;
}

const frontiers = new WeakMap<FloorBatch, { at: Instant; first: Map<string, number> }>();

/** Where the batch stands at an instant: the stage of its least advanced piece. */
export function placeOf(batch: FloorBatch, at: Instant): Place {
  if (batch.shippedAt !== null) return 'SHIPPED';
  if (batch.releasedAt === null) return 'QUEUED';
  const least = Math.min(...frontierOf(batch, at).values());
  return batch.route.steps[least]?.stage ?? 'READY';
}

/** The holds that run on the batch at an instant, the first to clear first. FRESHNESS holds nothing and is left out. */
export function holdsOf(batch: FloorBatch, at: Instant): Hold[] {
  return begunWaits(batch)
    .filter(({ wait }) => !wait.cut && wait.clearAt > at)
    .map(toHold)
    .sort((a, b) => a.clearAt - b.clearAt);
}

/** The maxima that still count: begun waits with a maximum whose next step has not started, the soonest first. */
export function limitsOf(batch: FloorBatch): Hold[] {
  return begunWaits(batch)
    .filter(({ step, piece, wait, index }) => {
      if (wait.latestAt === null) return false;
      const next = batch.route.steps.slice(index + 1).find((later) => later.kind === 'WORK');
      if (!next) return false;
      return relatedPieces(batch, next.scope, step.scope, piece).every(
        (p) => (runOf(batch, next.key, p)?.startedAt ?? null) === null,
      );
    })
    .map(toHold)
    .sort((a, b) => (a.latestAt ?? 0) - (b.latestAt ?? 0));
}

/** Work that could start on a piece at an instant: untouched, and everything before it done. */
export function startableSteps(
  batch: FloorBatch,
  at: Instant,
): { step: WorkStep; piece: number; index: number }[] {
  const startable: { step: WorkStep; piece: number; index: number }[] = [];
  batch.route.steps.forEach((step, index) => {
    if (step.kind !== 'WORK') return;
    for (const piece of piecesOf(batch, step.scope)) {
      if ((runOf(batch, step.key, piece)?.startedAt ?? null) !== null) continue;
      if (!firstUndoneBefore(batch, index, piece, at)) startable.push({ step, piece, index });
    }
  });
  return startable;
}

/** Work that has started and not finished. */
export function workingSteps(batch: FloorBatch): { step: WorkStep; piece: number; run: StepRun }[] {
  return batch.runs.flatMap((run) => {
    const step = batch.route.steps.find((candidate) => candidate.key === run.step);
    return step?.kind === 'WORK' && run.startedAt !== null && run.finishedAt === null
      ? [{ step, piece: run.piece, run }]
      : [];
  });
}

/** The first step before `index`, on a piece that `piece` depends on, that is not done at an instant; null when all are. */
export function firstUndoneBefore(
  batch: FloorBatch,
  index: number,
  piece: number,
  at: Instant,
): { step: RouteStep; piece: number } | null {
  const target = batch.route.steps[index];
  if (!target) return null;
  const frontier = frontierOf(batch, at);
  let least = index;
  let on = 0;
  for (const scope of SCOPES) {
    const from = batch.route.steps.findIndex((step) => step.scope === scope);
    if (from < 0 || from >= index) continue;
    for (const related of relatedPieces(batch, scope, target.scope, piece)) {
      const undone = frontier.get(`${scope}/${related}`) ?? Infinity;
      if (undone >= least) continue;
      least = undone;
      on = related;
    }
  }
  const step = least < index ? batch.route.steps[least] : undefined;
  return step ? { step, piece: on } : null;
}

const SCOPES: readonly StepScope[] = ['BATCH', 'PANEL', 'BLOCK'];

/** Working minutes that a step takes on a piece by the shop's standard times. */
export function standardMinutes(batch: FloorBatch, step: WorkStep): number {
  return step.setupMinutes + step.pieceMinutes * (step.scope === 'BATCH' ? batch.boards : 1);
}

function begunWaits(
  batch: FloorBatch,
): { step: WaitStep; piece: number; wait: BegunWait; index: number }[] {
  return batch.route.steps.flatMap((step, index) => {
    if (step.kind !== 'WAIT') return [];
    return piecesOf(batch, step.scope).flatMap((piece) => {
      const wait = waitOn(batch, step, piece);
      return wait ? [{ step, piece, wait, index }] : [];
    });
  });
}

function toHold({ step, piece, wait }: { step: WaitStep; piece: number; wait: BegunWait }): Hold {
  return {
    step: step.key,
    piece,
    kind: step.hold,
    since: wait.since,
    clearAt: wait.clearAt,
    latestAt: wait.latestAt,
    minMinutes: step.minMinutes,
    source: step.source,
    referenceTenthsC: step.referenceTenthsC,
  };
}
