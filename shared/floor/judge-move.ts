import type { Instant } from '#shared/time/instant';
import { rankOf, STAGES, stagesOf, stepAt, type RouteStep } from '#shared/route/route';
import { applyChanges } from './apply';
import { happenedAt } from './happened';
import type { FloorView } from './judge';
import { giveBack } from './judge-finish';
import { holdRunning, stillHeld } from './judge-start';
import type { Actor, FloorBatch, FloorCommand, RunChange } from './model';
import { cautionBefore, cutRun, isReason } from './override';
import { piecesOf } from './pieces';
import { holdsOf, isDone, placeOf, runOf, waitOn } from './progress';
import { noChanges, refuse, type Refusal, type Verdict } from './refusal';

type MoveCommand = Extract<FloorCommand, { kind: 'MOVE' }>;

/**
 * Whether a batch may be put onto a place. Forward finishes the steps in between, unless one of them is a wait that
 * still runs; back is rework and puts the steps back.
 */
export function judgeMove(
  view: FloorView,
  batch: FloorBatch,
  command: MoveCommand,
  actor: Actor,
): Verdict {
  const when = happenedAt(command.happenedAt, view.now, actor);
  if ('refusal' in when) return refuse(when.refusal);
  const from = placeOf(batch, when.at);
  const { to } = command;
  if (from === 'SHIPPED') return refuse({ code: 'SHIPPED_STAYS' });
  const isStage = STAGES.some((stage) => stage === to);
  if (isStage && !stagesOf(batch.route).some((stage) => stage === to)) {
    return refuse({ code: 'NOT_ON_ROUTE', place: to });
  }
  if (from === to) return refuse({ code: 'ALREADY_THERE', place: to });
  if (batch.releasedAt !== null && when.at < batch.releasedAt) {
    return refuse({ code: 'BEFORE_THE_FACT_BEFORE', earliest: batch.releasedAt });
  }
  return rankOf(to) > rankOf(from)
    ? forward(view, batch, command, actor, when.at)
    : back(batch, command, when.at);
}

function forward(
  view: FloorView,
  batch: FloorBatch,
  command: MoveCommand,
  actor: Actor,
  at: Instant,
): Verdict {
  const changes = noChanges();
  let moved = batch;
  for (const step of batch.route.steps) {
    if (rankOf(step.stage) >= rankOf(command.to)) break;
    const passed: RunChange[] = [];
    for (const piece of piecesOf(batch, step.scope)) {
      if (isDone(moved, step, piece, at)) continue;
      const change = pass(view, batch, step, piece, command, actor, at);
      if ('code' in change) return refuse(change);
      passed.push(change);
      if (step.kind === 'WAIT') changes.cut.push({ step: step.key, piece, kind: step.hold });
    }
    if (passed.length === 0) continue;
    changes.runs.push(...passed);
    moved = applyChanges(moved, { ...noChanges(), runs: passed });
  }
  if (command.override && changes.cut.length === 0) return refuse({ code: 'NOTHING_TO_OVERRIDE' });
  giveBack(batch, changes, at);
  if (batch.releasedAt === null) changes.fields.releasedAt = { before: null, after: at };
  if (command.to === 'SHIPPED') changes.fields.shippedAt = { before: null, after: at };
  return { ok: true, changes };
}

/** The change that gets a piece past a step on the way forward, or why it cannot pass. */
function pass(
  view: FloorView,
  batch: FloorBatch,
  step: RouteStep,
  piece: number,
  command: MoveCommand,
  actor: Actor,
  at: Instant,
): RunChange | Refusal {
  if (step.kind === 'WORK') {
    const run = runOf(batch, step.key, piece);
    if (run?.startedAt != null && run.startedAt > at) {
      return { code: 'BEFORE_THE_FACT_BEFORE', earliest: run.startedAt };
    }
    if (run?.finishedAt != null)
      return { code: 'BEFORE_THE_FACT_BEFORE', earliest: run.finishedAt };
    return {
      step: step.key,
      piece,
      before: run,
      after: {
        step: step.key,
        piece,
        startedAt: run?.startedAt ?? at,
        startedBy: run?.startedBy ?? actor.memberId,
        finishedAt: at,
        finishedBy: actor.memberId,
        cutAt: null,
        cutBy: null,
      },
    };
  }
  const wait = waitOn(batch, step, piece);
  if (!wait) {
    // The wait would only begin with this very move: finishing the work in between does not do the waiting.
    const before = batch.route.steps.find((candidate) => candidate.key === step.after);
    return {
      code: 'HOLD_AHEAD',
      kind: step.hold,
      beforeName: before?.name ?? step.after,
      minMinutes: step.minMinutes,
      source: step.source,
    };
  }
  if (!command.override) return stillHeld(step, piece, wait.clearAt, view.now);
  return (
    cautionBefore(command.override, step.hold) ?? cutRun(batch, step, piece, at, actor.memberId)
  );
}

/**
 * Putting the steps back does not end the waiting: wood with uncured glue or wet oil would be free for the machines of an
 * earlier stage. So a running hold refuses the way back too; an override's reason is then the reason of the rework.
 */
function back(batch: FloorBatch, command: MoveCommand, at: Instant): Verdict {
  const changes = noChanges();
  const isPutBack = (step: RouteStep) => rankOf(step.stage) >= rankOf(command.to);
  const putBack = new Set(batch.route.steps.filter(isPutBack).map((step) => step.key));
  for (const hold of holdsOf(batch, at)) {
    const step = stepAt(batch.route, hold.step)?.step;
    if (step?.kind !== 'WAIT' || !isPutBack(step) || hold.since > at) continue;
    if (!command.override) return refuse(holdRunning(step, hold.piece, hold.clearAt));
    const refusal = cautionBefore(command.override, hold.kind);
    if (refusal) return refuse(refusal);
    changes.cut.push({ step: hold.step, piece: hold.piece, kind: hold.kind });
  }
  if (command.override && changes.cut.length === 0) return refuse({ code: 'NOTHING_TO_OVERRIDE' });
  if (!isReason(command.reason ?? command.override?.reason ?? null)) {
    return refuse({ code: 'REASON_MISSING', what: 'REWORK' });
  }
  for (const run of batch.runs) {
    if (!putBack.has(run.step)) continue;
    const latest = Math.max(run.startedAt ?? 0, run.finishedAt ?? 0, run.cutAt ?? 0);
    if (latest > at) return refuse({ code: 'BEFORE_THE_FACT_BEFORE', earliest: latest });
    changes.runs.push({ step: run.step, piece: run.piece, before: run, after: null });
  }
  for (const occupation of batch.occupations) {
    if (occupation.until === null && putBack.has(occupation.step)) {
      changes.released.push({ occupation, at: Math.max(at, occupation.since) });
    }
  }
  if (command.to === 'QUEUED') {
    changes.fields.releasedAt = { before: batch.releasedAt, after: null };
  }
  return { ok: true, changes };
}
