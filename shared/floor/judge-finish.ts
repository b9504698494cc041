import type { Instant } from '#shared/time/instant';
import { stepAt } from '#shared/route/route';
import { happenedAt } from './happened';
import type { FloorView } from './judge';
import { workStepOn } from './judge-start';
import type { Actor, FloorBatch, FloorChangeSet, FloorCommand } from './model';
import { relatedPieces } from './pieces';
import { runOf } from './progress';
import { noChanges, refuse, type Verdict } from './refusal';
import { releasingStep } from './resources';

type FinishCommand = Extract<FloorCommand, { kind: 'START' | 'FINISH' }>;

/** Whether work that has started may be called finished, and what that gives back. */
export function judgeFinish(
  view: FloorView,
  batch: FloorBatch,
  command: FinishCommand,
  actor: Actor,
): Verdict {
  if (batch.shippedAt !== null) return refuse({ code: 'BATCH_GONE' });
  if (command.override) return refuse({ code: 'NOTHING_TO_OVERRIDE' });
  const when = happenedAt(command.happenedAt, view.now, actor);
  if ('refusal' in when) return refuse(when.refusal);
  const found = workStepOn(batch, command);
  if ('refusal' in found) return refuse(found.refusal);
  const changes = noChanges();
  for (const piece of found.pieces) {
    const run = runOf(batch, found.step.key, piece);
    const named = { stepName: found.step.name, piece, pieceKind: found.step.scope };
    if (run?.startedAt == null) return refuse({ code: 'NOT_STARTED', ...named });
    if (run.finishedAt !== null) return refuse({ code: 'ALREADY_FINISHED', ...named });
    if (when.at < run.startedAt) {
      return refuse({ code: 'BEFORE_THE_FACT_BEFORE', earliest: run.startedAt });
    }
    changes.runs.push({
      step: found.step.key,
      piece,
      before: run,
      after: { ...run, finishedAt: when.at, finishedBy: actor.memberId },
    });
  }
  giveBack(batch, changes, when.at);
  return { ok: true, changes };
}

/** Ends the occupations whose releasing step is finished, after `changes`, on all the pieces they are for. */
export function giveBack(batch: FloorBatch, changes: FloorChangeSet, at: Instant): void {
  const finished = new Set(
    changes.runs
      .filter((change) => change.after?.finishedAt != null)
      .map((change) => `${change.step}/${change.piece}`),
  );
  for (const occupation of batch.occupations) {
    if (occupation.until !== null) continue;
    const taker = stepAt(batch.route, occupation.step)?.step;
    if (taker?.kind !== 'WORK') continue;
    const giver = stepAt(batch.route, releasingStep(taker, occupation))?.step;
    if (!giver) continue;
    const pieces = relatedPieces(batch, giver.scope, taker.scope, occupation.piece);
    // The last of the pieces gives it back, which need not be the one that is recorded last.
    let last = occupation.since;
    for (const piece of pieces) {
      const isNow = finished.has(`${giver.key}/${piece}`);
      const finishedAt = isNow ? at : (runOf(batch, giver.key, piece)?.finishedAt ?? Infinity);
      last = Math.max(last, finishedAt);
    }
    if (last !== Infinity) changes.released.push({ occupation, at: last });
  }
}
