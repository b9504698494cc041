import type { FloorBatch, StepRun } from '#shared/floor/model';
import { piecesOf } from '#shared/floor/pieces';
import { isDone, limitsOf, runOf, startableSteps, waitOn } from '#shared/floor/progress';
import type { RouteStep, StepScope, WaitStep } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';

/** How one step stands on one piece. */
export type StepState =
  | { readonly kind: 'TODO' }
  /** It could start now. */
  | { readonly kind: 'STARTABLE' }
  | { readonly kind: 'WORKING'; readonly since: Instant; readonly by: string | null }
  | { readonly kind: 'DONE'; readonly at: Instant; readonly by: string | null }
  | { readonly kind: 'HOLDING'; readonly since: Instant; readonly clearAt: Instant }
  /** A wait that is over and wants nothing any more. */
  | { readonly kind: 'CLEAR'; readonly at: Instant }
  /** A wait that holds nothing any more, but wants the next step by then. */
  | { readonly kind: 'LIMIT'; readonly latestAt: Instant; readonly isMissed: boolean }
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
  const limits = new Map(
    limitsOf(batch).map((limit) => [`${limit.step}/${limit.piece}`, limit.latestAt]),
  );
  return piecesOf(batch, scope).map((piece) => ({
    scope,
    piece,
    cells: steps.map((step) => ({
      step,
      piece,
      state:
        step.kind === 'WORK'
          ? workState(runOf(batch, step.key, piece), startable.has(`${step.key}/${piece}`))
          : waitState(batch, step, piece, at, limits.get(`${step.key}/${piece}`) ?? null),
    })),
  }));
}

function waitState(
  batch: FloorBatch,
  step: WaitStep,
  piece: number,
  at: Instant,
  latestAt: Instant | null,
): StepState {
  const wait = waitOn(batch, step, piece);
  if (!wait) return { kind: 'TODO' };
  if (wait.cut) {
    return { kind: 'CUT', at: wait.clearAt, by: runOf(batch, step.key, piece)?.cutBy ?? null };
  }
  if (!isDone(batch, step, piece, at)) {
    return { kind: 'HOLDING', since: wait.since, clearAt: wait.clearAt };
  }
  if (latestAt !== null) return { kind: 'LIMIT', latestAt, isMissed: latestAt < at };
  return { kind: 'CLEAR', at: wait.clearAt };
}

function workState(run: StepRun | null, canStart: boolean): StepState {
  if (run?.finishedAt != null) return { kind: 'DONE', at: run.finishedAt, by: run.finishedBy };
  if (run?.startedAt != null) return { kind: 'WORKING', since: run.startedAt, by: run.startedBy };
  return { kind: canStart ? 'STARTABLE' : 'TODO' };
}
