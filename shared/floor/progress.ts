import type { Instant } from '#shared/time/instant';
import type { Place, RouteStep, StepScope, WaitStep, WorkStep } from '#shared/route/route';
import { indexOf, positionOf, type BegunWait } from './batch-index';
import type { FloorBatch, Hold, StepRun } from './model';
import { relatedPieces } from './pieces';

export type { BegunWait } from './batch-index';

/** The run of a step on a piece, or null when nobody has touched it. */
export function runOf(batch: FloorBatch, step: string, piece: number): StepRun | null {
  return indexOf(batch).runs.get(step)?.[piece] ?? null;
}

/** The wait on a piece, or null when it has not begun. */
export function waitOn(batch: FloorBatch, wait: WaitStep, piece: number): BegunWait | null {
  return indexOf(batch).waits[positionOf(batch.route, wait.key)]?.[piece] ?? null;
}

/** Whether a step is done on a piece at an instant: finished work, or a wait that has cleared. */
export function isDone(batch: FloorBatch, step: RouteStep, piece: number, at: Instant): boolean {
  const doneAt = indexOf(batch).doneAt[positionOf(batch.route, step.key)]?.[piece];
  return doneAt !== undefined && doneAt <= at;
}

/** By scope and piece number, the place in the route of a piece's first step of that scope that is not done. */
type Frontier = Record<StepScope, (number | undefined)[]>;

const frontiers = new WeakMap<FloorBatch, { at: Instant; first: Frontier }>();

/** How far each piece has come. Kept for the last instant asked, since a card asks many times for one. */
function frontierOf(batch: FloorBatch, at: Instant): Frontier {
  const kept = frontiers.get(batch);
  if (kept?.at === at) return kept.first;
  const first: Frontier = { BATCH: [], PANEL: [], BLOCK: [] };
  const { doneAt } = indexOf(batch);
  batch.route.steps.forEach((step, index) => {
    const reached = first[step.scope];
    doneAt[index]?.forEach((done, piece) => {
      if (done > at) reached[piece] ??= index;
    });
  });
  frontiers.set(batch, { at, first });
  return first;
}

/** Where the batch stands at an instant: the stage of its least advanced piece. */
export function placeOf(batch: FloorBatch, at: Instant): Place {
  if (batch.shippedAt !== null) return 'SHIPPED';
  if (batch.releasedAt === null) return 'QUEUED';
  const frontier = frontierOf(batch, at);
  let least = Infinity;
  for (const scope of SCOPES) {
    for (const index of frontier[scope]) least = Math.min(least, index ?? Infinity);
  }
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
  const frontier = frontierOf(batch, at);
  for (const scope of SCOPES) {
    // Only the first thing left to do on a piece can be started on it.
    frontier[scope].forEach((index, piece) => {
      const step = index === undefined ? undefined : batch.route.steps[index];
      if (index === undefined || step?.kind !== 'WORK') return;
      if ((runOf(batch, step.key, piece)?.startedAt ?? null) !== null) return;
      if (!firstUndoneBefore(batch, index, piece, at)) startable.push({ step, piece, index });
    });
  }
  return startable.sort((a, b) => a.index - b.index || a.piece - b.piece);
}

/** Work that has started and not finished. */
export function workingSteps(batch: FloorBatch): { step: WorkStep; piece: number; run: StepRun }[] {
  return batch.runs.flatMap((run) => {
    if (run.startedAt === null || run.finishedAt !== null) return [];
    const step = batch.route.steps[positionOf(batch.route, run.step)];
    return step?.kind === 'WORK' ? [{ step, piece: run.piece, run }] : [];
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
    if (!frontier[scope].some((undone) => undone !== undefined && undone < index)) continue;
    for (const related of relatedPieces(batch, scope, target.scope, piece)) {
      const undone = frontier[scope][related] ?? Infinity;
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

interface Begun {
  step: WaitStep;
  piece: number;
  wait: BegunWait;
  index: number;
}

function begunWaits(batch: FloorBatch): Begun[] {
  const { waits } = indexOf(batch);
  const begun: Begun[] = [];
  batch.route.steps.forEach((step, index) => {
    if (step.kind !== 'WAIT') return;
    waits[index]?.forEach((wait, piece) => {
      if (wait) begun.push({ step, piece, wait, index });
    });
  });
  return begun;
}

function toHold({ step, piece, wait }: Begun): Hold {
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
