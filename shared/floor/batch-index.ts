import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { Route, StepScope, WaitStep } from '#shared/route/route';
import type { FloorBatch, StepRun } from './model';
import { piecesOf, relatedPieces } from './pieces';

/** A wait on one piece once it has begun: since when, until when, and when the next step comes too late. */
export interface BegunWait {
  since: Instant;
  /** When it clears: its minimum, or the moment an override cut it. */
  clearAt: Instant;
  latestAt: Instant | null;
  cut: boolean;
}

/**
 * What the rules ask of a batch again and again, worked out once for each state of it: cards of hundreds of batches are
 * read on every change, and again with every minute. Nothing here depends on the moment that is asked about.
 */
export interface BatchIndex {
  /** Runs by the step's key, then by piece number. */
  runs: ReadonlyMap<string, readonly (StepRun | undefined)[]>;
  /** Begun waits by the step's place in the route, then by piece number. */
  waits: readonly (readonly (BegunWait | null)[])[];
  /** When a step is done on a piece, likewise; Infinity when that cannot be told yet. */
  doneAt: readonly (readonly Instant[])[];
}

const indexes = new WeakMap<FloorBatch, BatchIndex>();
const positions = new WeakMap<Route, ReadonlyMap<string, number>>();

/** The index of a batch. A batch is a value: another state is another object. */
export function indexOf(batch: FloorBatch): BatchIndex {
  let index = indexes.get(batch);
  if (!index) {
    index = build(batch);
    indexes.set(batch, index);
  }
  return index;
}

/** The place of a step in a route; -1 when the route has none with this key. */
export function positionOf(route: Route, key: string): number {
  let known = positions.get(route);
  if (!known) {
    known = new Map(route.steps.map((step, index) => [step.key, index]));
    positions.set(route, known);
  }
  return known.get(key) ?? -1;
}

function build(batch: FloorBatch): BatchIndex {
  const runs = new Map<string, (StepRun | undefined)[]>();
  for (const run of batch.runs) {
    const known = runs.get(run.step);
    if (known) known[run.piece] = run;
    else {
      const first: (StepRun | undefined)[] = [];
      first[run.piece] = run;
      runs.set(run.step, first);
    }
  }
  const pieces: Record<StepScope, readonly number[]> = {
    BATCH: piecesOf(batch, 'BATCH'),
    PANEL: piecesOf(batch, 'PANEL'),
    BLOCK: piecesOf(batch, 'BLOCK'),
  };
  const waits: (BegunWait | null)[][] = [];
  const doneAt: Instant[][] = [];
  for (const step of batch.route.steps) {
    const begun: (BegunWait | null)[] = [];
    const done: Instant[] = [];
    for (const piece of pieces[step.scope]) {
      if (step.kind === 'WORK') {
        done[piece] = runs.get(step.key)?.[piece]?.finishedAt ?? Infinity;
      } else {
        const wait = waitFrom(batch, runs, step, piece);
        begun[piece] = wait;
        done[piece] = wait?.clearAt ?? Infinity;
      }
    }
    waits.push(begun);
    doneAt.push(done);
  }
  return { runs, waits, doneAt };
}

/** Its minimum counts from the last of the pieces it waits for, its maximum from the first: the first face planed goes stale first. */
function waitFrom(
  batch: FloorBatch,
  runs: BatchIndex['runs'],
  wait: WaitStep,
  piece: number,
): BegunWait | null {
  const from = batch.route.steps[positionOf(batch.route, wait.after)];
  const finished = runs.get(wait.after);
  if (!from || !finished) return null;
  let first = Infinity;
  let last = -Infinity;
  for (const related of relatedPieces(batch, from.scope, wait.scope, piece)) {
    const finishedAt = finished[related]?.finishedAt ?? null;
    if (finishedAt === null) return null;
    first = Math.min(first, finishedAt);
    last = Math.max(last, finishedAt);
  }
  const cutAt = runs.get(wait.key)?.[piece]?.cutAt ?? null;
  const minimum = last + wait.minMinutes * MINUTE_MS;
  return {
    since: last,
    clearAt: cutAt === null ? minimum : Math.min(cutAt, minimum),
    latestAt: wait.maxMinutes === null ? null : first + wait.maxMinutes * MINUTE_MS,
    cut: cutAt !== null,
  };
}
