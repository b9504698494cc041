import type { Instant } from '#shared/time/instant';
import { rankOf, type HoldKind, type Place, type WorkStep } from '#shared/route/route';
import type { FloorBatch, Hold, Shelf } from './model';
import { piecesOf } from './pieces';
import {
  holdsOf,
  isDone,
  limitsOf,
  placeOf,
  runOf,
  startableSteps,
  workingSteps,
} from './progress';

/** The one thing to do next on a batch: start or finish a step on a piece. */
export interface NextAction {
  kind: 'START' | 'FINISH';
  step: WorkStep;
  piece: number;
  /** When it comes too late, if a maximum wait runs. */
  latestAt: Instant | null;
}

/** A batch as its card on the Floor shows it at an instant. */
export interface Card {
  place: Place;
  shelf: Shelf;
  /** Running holds, the first to clear first. */
  holds: Hold[];
  /** Maxima that run, the soonest first. */
  limits: Hold[];
  /** What may be started or finished, the most pressing first. */
  actions: NextAction[];
  /** Members at work on it, else the one it is given to. */
  people: string[];
  /** Whether its boards are marked: a hold was overridden, and the final check has not been done since. */
  marked: boolean;
}

/** Reads a batch for its card. */
export function cardOf(batch: FloorBatch, at: Instant): Card {
  const place = placeOf(batch, at);
  const holds = holdsOf(batch, at);
  const working = workingSteps(batch);
  const limits = limitsOf(batch);
  const done = place === 'READY' || place === 'SHIPPED';
  const actions = done ? [] : actionsOf(batch, at, limits);
  const shelf: Shelf =
    working.length > 0 ? 'WORKING' : actions.length > 0 || holds.length === 0 ? 'READY' : 'HOLDING';
  const people = [...new Set(working.flatMap(({ run }) => run.startedBy ?? []))];
  if (people.length === 0 && batch.assignedTo !== null) people.push(batch.assignedTo);
  return { place, shelf, holds, limits, actions, people, marked: isMarked(batch) };
}

/** Work to finish first, then what runs out soonest, then in the order of the route and the pieces. */
function actionsOf(batch: FloorBatch, at: Instant, limits: readonly Hold[]): NextAction[] {
  const latestFor = (stepIndex: number, piece: number): Instant | null => {
    const limit = limits.find((hold) => {
      const waitIndex = batch.route.steps.findIndex((step) => step.key === hold.step);
      const next = batch.route.steps.findIndex(
        (step, index) => index > waitIndex && step.kind === 'WORK',
      );
      return next === stepIndex && (hold.piece === piece || hold.piece === 0);
    });
    return limit?.latestAt ?? null;
  };
  const finish: NextAction[] = workingSteps(batch).map(({ step, piece }) => ({
    kind: 'FINISH',
    step,
    piece,
    latestAt: null,
  }));
  const start = startableSteps(batch, at).map(({ step, piece, index }) => ({
    kind: 'START' as const,
    step,
    piece,
    index,
    latestAt: latestFor(index, piece),
  }));
  start.sort(
    (a, b) =>
      (a.latestAt ?? Infinity) - (b.latestAt ?? Infinity) || a.index - b.index || a.piece - b.piece,
  );
  return [
    ...finish,
    ...start.map(({ kind, step, piece, latestAt }) => ({ kind, step, piece, latestAt })),
  ];
}

/** How many pieces of the batch are in which state, for "1 in clamps, 2 curing, 1 to glue". Empty outside piece stages. */
export interface PieceCount {
  count: number;
  state:
    | { kind: 'HOLD'; hold: HoldKind }
    | { kind: 'WORKING'; name: string }
    | { kind: 'TODO'; verb: string };
}

export function pieceCounts(batch: FloorBatch, at: Instant): PieceCount[] {
  const place = placeOf(batch, at);
  const scope = batch.route.steps.find(
    (step) => step.stage === place && step.scope !== 'BATCH',
  )?.scope;
  if (!scope) return [];
  const steps = batch.route.steps.filter(
    (step) => step.scope === scope && rankOf(step.stage) >= rankOf(place),
  );
  const counts = new Map<string, PieceCount>();
  for (const piece of piecesOf(batch, scope)) {
    const step = steps.find((candidate) => !isDone(batch, candidate, piece, at));
    if (!step) continue;
    const state: PieceCount['state'] =
      step.kind === 'WAIT'
        ? { kind: 'HOLD', hold: step.hold }
        : (runOf(batch, step.key, piece)?.startedAt ?? null) !== null
          ? { kind: 'WORKING', name: step.name }
          : { kind: 'TODO', verb: step.verb };
    const key = JSON.stringify(state);
    const seen = counts.get(key);
    if (seen) seen.count += 1;
    else counts.set(key, { count: 1, state });
  }
  return [...counts.values()];
}

/** The key of the step that takes the mark of an override off. */
export const FINAL_CHECK = 'final-check';

function isMarked(batch: FloorBatch): boolean {
  const lastOverride = Math.max(-Infinity, ...batch.overrides.map((override) => override.at));
  if (lastOverride === -Infinity) return false;
  const checkedAt = runOf(batch, FINAL_CHECK, 0)?.finishedAt ?? null;
  return checkedAt === null || checkedAt < lastOverride;
}

/** How much of a batch's work and waiting is done, in whole percent; 100 only when all of it is. */
export function progressPercent(batch: FloorBatch, at: Instant): number {
  const place = placeOf(batch, at);
  if (place === 'READY' || place === 'SHIPPED') return 100;
  let all = 0;
  let done = 0;
  for (const step of batch.route.steps) {
    for (const piece of piecesOf(batch, step.scope)) {
      const minutes =
        step.kind === 'WAIT'
          ? step.minMinutes
          : step.setupMinutes + step.pieceMinutes * (step.scope === 'BATCH' ? batch.boards : 1);
      all += minutes;
      if (isDone(batch, step, piece, at)) done += minutes;
    }
  }
  return all === 0 ? 0 : Math.min(99, Math.floor((100 * done) / all));
}
