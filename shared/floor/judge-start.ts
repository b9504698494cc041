import type { Instant } from '#shared/time/instant';
import { stepAt, type WaitStep, type WorkStep } from '#shared/route/route';
import { cautionBefore, cutRun } from './override';
import { happenedAt } from './happened';
import type { FloorView } from './judge';
import type { Actor, FloorBatch, FloorChangeSet, FloorCommand, Occupation } from './model';
import { piecesOf, relatedPieces } from './pieces';
import { firstUndoneBefore, isDone, runOf, waitOn } from './progress';
import { noChanges, refuse, type Refusal, type Verdict } from './refusal';
import {
  chooseClamps,
  clampNeedOf,
  clampPeak,
  clampsThatDo,
  CLAMPS,
  firstToFree,
  heldFrom,
  stationPeak,
  stationUnits,
} from './resources';

type StartCommand = Extract<FloorCommand, { kind: 'START' | 'FINISH' }>;

/** Whether a step may start on the given pieces, and what that takes. */
export function judgeStart(
  view: FloorView,
  batch: FloorBatch,
  command: StartCommand,
  actor: Actor,
): Verdict {
  if (batch.shippedAt !== null) return refuse({ code: 'BATCH_GONE' });
  const when = happenedAt(command.happenedAt, view.now, actor);
  if ('refusal' in when) return refuse(when.refusal);
  const found = workStepOn(batch, command);
  if ('refusal' in found) return refuse(found.refusal);
  const { step, index, pieces } = found;
  const earliest = factBefore(batch, step, pieces);
  if (when.at < earliest) return refuse({ code: 'BEFORE_THE_FACT_BEFORE', earliest });
  const changes = noChanges();
  for (const piece of pieces) {
    const run = runOf(batch, step.key, piece);
    const named = { stepName: step.name, piece, pieceKind: step.scope };
    if (run?.finishedAt != null) return refuse({ code: 'ALREADY_FINISHED', ...named });
    if (run?.startedAt != null) return refuse({ code: 'ALREADY_STARTED', ...named });
    const refusal = readyFor(view, batch, command, actor, step, index, piece, when.at, changes);
    if (refusal) return refuse(refusal);
    changes.runs.push({
      step: step.key,
      piece,
      before: run,
      after: {
        step: step.key,
        piece,
        startedAt: when.at,
        startedBy: actor.memberId,
        finishedAt: null,
        finishedBy: null,
        cutAt: null,
        cutBy: null,
      },
    });
  }
  if (command.override && changes.cut.length === 0) return refuse({ code: 'NOTHING_TO_OVERRIDE' });
  if (batch.releasedAt === null) changes.fields.releasedAt = { before: null, after: when.at };
  const full = takeResources(view, batch, step, pieces, when.at, changes);
  return full ? refuse(full) : { ok: true, changes };
}

/** What a start cannot be earlier than: the batch's release, and the end of the same work done before a rework. */
function factBefore(batch: FloorBatch, step: WorkStep, pieces: readonly number[]): Instant {
  const ended = batch.occupations
    .filter((o) => o.step === step.key && pieces.includes(o.piece) && o.until !== o.since)
    .map((o) => o.until ?? -Infinity);
  return Math.max(batch.releasedAt ?? -Infinity, ...ended);
}

/** The work step and pieces that a command names, or what is wrong with them. */
export function workStepOn(
  batch: FloorBatch,
  command: StartCommand,
): { step: WorkStep; index: number; pieces: number[] } | { refusal: Refusal } {
  const found = stepAt(batch.route, command.step);
  if (found?.step.kind !== 'WORK') {
    return { refusal: { code: 'STEP_UNKNOWN', step: command.step.slice(0, 60) } };
  }
  const pieces = [...new Set(command.pieces)].sort((a, b) => a - b);
  if (pieces.length === 0) return { refusal: { code: 'PIECES_EMPTY' } };
  const known = piecesOf(batch, found.step.scope);
  const unknown = pieces.find((piece) => !known.includes(piece));
  if (unknown !== undefined) {
    return {
      refusal: {
        code: 'PIECE_UNKNOWN',
        step: found.step.name,
        piece: unknown,
        pieces: known.length,
      },
    };
  }
  return { step: found.step, index: found.index, pieces };
}

function readyFor(
  view: FloorView,
  batch: FloorBatch,
  command: StartCommand,
  actor: Actor,
  step: WorkStep,
  index: number,
  piece: number,
  at: Instant,
  changes: FloorChangeSet,
): Refusal | null {
  const cutHere = (wait: WaitStep, on: number) =>
    changes.cut.some((cut) => cut.step === wait.key && cut.piece === on);
  for (const [beforeIndex, before] of batch.route.steps.slice(0, index).entries()) {
    for (const related of relatedPieces(batch, before.scope, step.scope, piece)) {
      if (isDone(batch, before, related, at)) continue;
      if (before.kind === 'WORK') {
        const doneLater = isDone(batch, before, related, view.now);
        const finishedAt = runOf(batch, before.key, related)?.finishedAt;
        if (doneLater && finishedAt != null) {
          return { code: 'BEFORE_THE_FACT_BEFORE', earliest: finishedAt };
        }
        return {
          code: 'STEP_BEFORE',
          stepName: step.name,
          beforeName: before.name,
          piece: related,
          pieceKind: before.scope,
        };
      }
      if (cutHere(before, related)) continue;
      const wait = waitOn(batch, before, related);
      if (!wait) {
        const undone = firstUndoneBefore(batch, beforeIndex, related, view.now);
        return {
          code: 'STEP_BEFORE',
          stepName: step.name,
          beforeName: undone?.step.name ?? before.name,
          piece: undone?.piece ?? related,
          pieceKind: undone?.step.scope ?? before.scope,
        };
      }
      if (!command.override) return stillHeld(before, related, wait.clearAt, view.now);
      const refusal = cautionBefore(command.override, before.hold);
      if (refusal) return refusal;
      changes.cut.push({ step: before.key, piece: related, kind: before.hold });
      changes.runs.push(cutRun(batch, before, related, at, actor.memberId));
    }
  }
  return null;
}

/** The refusal of a hold that runs at the moment a fact is said to be of; one that has cleared since is a matter of time. */
export function stillHeld(wait: WaitStep, piece: number, clearAt: Instant, now: Instant): Refusal {
  return clearAt <= now
    ? { code: 'BEFORE_THE_FACT_BEFORE', earliest: clearAt }
    : holdRunning(wait, piece, clearAt);
}

/** The refusal that a running hold gives. */
export function holdRunning(wait: WaitStep, piece: number, clearAt: Instant): Refusal {
  return {
    code: 'HOLD_RUNNING',
    kind: wait.hold,
    piece,
    pieceKind: wait.scope,
    clearAt,
    minMinutes: wait.minMinutes,
    source: wait.source,
    referenceTenthsC: wait.referenceTenthsC,
  };
}

function takeResources(
  view: FloorView,
  batch: FloorBatch,
  step: WorkStep,
  pieces: readonly number[],
  at: Instant,
  changes: FloorChangeSet,
): Refusal | null {
  const stations = [step.station, ...step.takes.map((take) => take.resource)].filter(
    (resource): resource is string => resource !== null && resource !== CLAMPS,
  );
  for (const key of new Set(stations)) {
    const refusal = takeStation(view, batch, step, key, pieces, at, changes);
    if (refusal) return refusal;
  }
  if (!step.takes.some((take) => take.resource === CLAMPS)) return null;
  return takeClamps(view, batch, step, pieces, at, changes);
}

function takeStation(
  view: FloorView,
  batch: FloorBatch,
  step: WorkStep,
  key: string,
  pieces: readonly number[],
  at: Instant,
  changes: FloorChangeSet,
): Refusal | null {
  const station = view.shop.stations.find((candidate) => candidate.key === key);
  // A station that the shop has given up since the route was copied limits nothing any more.
  if (!station) return null;
  const perPiece = stationUnits(station, batch, step.scope);
  const taken = pieces.map((piece) => occupationOf(step, piece, key, false, perPiece, at));
  // Judged with what would be taken in place, since a batch that has the station at one time may not at another.
  const after = { ...batch, occupations: [...batch.occupations, ...taken] };
  const batches = view.batches.map((other) => (other.id === batch.id ? after : other));
  if (stationPeak(station, batches, at) <= station.capacity) {
    changes.taken.push(...taken);
    return null;
  }
  return {
    code: 'STATION_FULL',
    station: station.name,
    capacity: station.capacity,
    need: station.unit === 'BATCH' ? 1 : perPiece * pieces.length,
    free: Math.max(0, station.capacity - stationPeak(station, view.batches, at)),
    holder: firstToFree(heldFrom(view.batches, key, false, at), view.now),
  };
}

function takeClamps(
  view: FloorView,
  batch: FloorBatch,
  step: WorkStep,
  pieces: readonly number[],
  at: Instant,
  changes: FloorChangeSet,
): Refusal | null {
  const need = clampNeedOf(batch, step.scope);
  if (!need || need.count === 0) return null;
  const free = new Map(
    view.shop.clamps.map((clamp) => [
      clamp.key,
      Math.max(0, clamp.count - clampPeak(clamp, view.batches, at)),
    ]),
  );
  const thatDo = clampsThatDo(view.shop, need);
  const freeAtFirst = thatDo.reduce((sum, clamp) => sum + (free.get(clamp.key) ?? 0), 0);
  for (const piece of pieces) {
    const chosen = chooseClamps(view.shop, need, free);
    if (!chosen) {
      return {
        code: 'CLAMPS_FULL',
        need: need.count * pieces.length,
        free: freeAtFirst,
        owned: thatDo.reduce((sum, clamp) => sum + clamp.count, 0),
        holder: firstToFree(
          thatDo.flatMap((clamp) => heldFrom(view.batches, clamp.key, true, at)),
          view.now,
        ),
      };
    }
    for (const { key, amount } of chosen) {
      free.set(key, (free.get(key) ?? 0) - amount);
      changes.taken.push(occupationOf(step, piece, key, true, amount, at));
    }
  }
  return null;
}

function occupationOf(
  step: WorkStep,
  piece: number,
  resource: string,
  isClamps: boolean,
  amount: number,
  since: Instant,
): Occupation {
  return { resource, isClamps, amount, step: step.key, piece, since, until: null };
}
