import type { FloorBatch, StepRun } from '#shared/floor/model';
import { piecesOf } from '#shared/floor/pieces';
import { isDone, runOf, startableSteps, waitOn } from '#shared/floor/progress';
import type { RouteStep, StepScope } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';

/** How one step stands on one piece. */
export type StepState =
  | { readonly kind: 'TODO' }
  /** It could start now. */
  | { readonly kind: 'STARTABLE' }
  | { readonly kind: 'WORKING'; readonly since: Instant; readonly by: string | null }
  | { readonly kind: 'DONE'; readonly at: Instant; readonly by: string | null }
  | { readonly kind: 'HOLDING'; readonly since: Instant; readonly clearAt: Instant }
  /** A wait that holds nothing any more, but wants the next step by then. */
  | { readonly kind: 'CLEAR'; readonly at: Instant; readonly latestAt: Instant | null }
  | { readonly kind: 'CUT'; readonly at: Instant; readonly by: string | null };

export interface StepCell {
  readonly step: RouteStep;
  readonly piece: number;
  readonly state: StepState;
}

/** One piece with the chain of its steps; piece 0 is the whole batch. */
export interface PieceRow {
  readonly scope: StepScope;
  readonly piece: number;
  readonly cells: readonly StepCell[];
}

/** The pieces of a scope, each with its own steps in the route's order; none where the route has no such steps. */
export function pieceRows(batch: FloorBatch, scope: StepScope, at: Instant): PieceRow[] {
  const steps = batch.route.steps.filter((step) => step.scope === scope);
  if (steps.length === 0) return [];
  const startable = new Set(
    startableSteps(batch, at).map(({ step, piece }) => `${step.key}/${piece}`),
  );
  return piecesOf(batch, scope).map((piece) => ({
    scope,
    piece,
    cells: steps.map((step) => ({
      step,
      piece,
      state: stateOf(batch, step, piece, at, startable.has(`${step.key}/${piece}`)),
    })),
  }));
}

function stateOf(
  batch: FloorBatch,
  step: RouteStep,
  piece: number,
  at: Instant,
  canStart: boolean,
): StepState {
  const run = runOf(batch, step.key, piece);
  if (step.kind === 'WORK') return workState(run, canStart);
  const wait = waitOn(batch, step, piece);
  if (!wait) return { kind: 'TODO' };
  if (wait.cut) return { kind: 'CUT', at: wait.clearAt, by: run?.cutBy ?? null };
  if (isDone(batch, step, piece, at)) {
    return { kind: 'CLEAR', at: wait.clearAt, latestAt: wait.latestAt };
  }
  return { kind: 'HOLDING', since: wait.since, clearAt: wait.clearAt };
}

function workState(run: StepRun | null, canStart: boolean): StepState {
  if (run?.finishedAt != null) return { kind: 'DONE', at: run.finishedAt, by: run.finishedBy };
  if (run?.startedAt != null) return { kind: 'WORKING', since: run.startedAt, by: run.startedBy };
  return { kind: canStart ? 'STARTABLE' : 'TODO' };
}
