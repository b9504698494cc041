import { applyChanges } from '#shared/floor/apply';
import { judge, type FloorView } from '#shared/floor/judge';
import type {
  Actor,
  FloorBatch,
  FloorChangeSet,
  FloorCommand,
  FloorShop,
  OverrideRequest,
  StepRun,
} from '#shared/floor/model';
import { piecesOf } from '#shared/floor/pieces';
import type { Refusal, RefusalCode } from '#shared/floor/refusal';
import { judgeUndo } from '#shared/floor/undo';
import { stepAt, type Place } from '#shared/route/route';
import type { Instant } from '#shared/time/instant';
import { aBatch, aShop, MAKER, minutes, NOW } from './floor';

type StepCommand = Extract<FloorCommand, { kind: 'START' | 'FINISH' }>;
type MoveCommand = Extract<FloorCommand, { kind: 'MOVE' }>;

export const start = (
  step: string,
  pieces: readonly number[] = [0],
  more: Partial<StepCommand> = {},
): FloorCommand => ({
  kind: 'START',
  step,
  pieces,
  happenedAt: null,
  override: null,
  ...more,
});

export const finish = (
  step: string,
  pieces: readonly number[] = [0],
  more: Partial<StepCommand> = {},
): FloorCommand => ({ ...start(step, pieces, more), kind: 'FINISH' }) as FloorCommand;

export const move = (to: Place, more: Partial<MoveCommand> = {}): FloorCommand => ({
  kind: 'MOVE',
  to,
  reason: null,
  happenedAt: null,
  override: null,
  ...more,
});

/** An override as it has to be asked for. */
export const overriding: { override: OverrideRequest } = {
  override: { reason: 'the customer waits at the door', cautionRead: true },
};

/** A run of work that was done at an instant. */
export function aRun(step: string, piece: number, at: Instant): StepRun {
  return {
    step,
    piece,
    startedAt: at,
    startedBy: MAKER.memberId,
    finishedAt: at,
    finishedBy: MAKER.memberId,
    cutAt: null,
    cutBy: null,
  };
}

/** The batch with all work before a step done, on every piece, at one instant. */
export function doneBefore(batch: FloorBatch, step: string, at: Instant): FloorBatch {
  const end = stepAt(batch.route, step)?.index;
  if (end === undefined) throw new Error(`The route has no ${step}.`);
  const runs = batch.route.steps
    .slice(0, end)
    .flatMap((before) =>
      before.kind === 'WORK'
        ? piecesOf(batch, before.scope).map((piece) => aRun(before.key, piece, at))
        : [],
    );
  return { ...batch, releasedAt: at, runs };
}

/** The batch with all work before a step done and all waits waited for, so that the step can start at an instant. */
export function readyFor(batch: FloorBatch, step: string, at: Instant): FloorBatch {
  const end = stepAt(batch.route, step)?.index;
  if (end === undefined) throw new Error(`The route has no ${step}.`);
  const doneAfter = new Map<string, number>();
  let time = 0;
  for (const before of batch.route.steps.slice(0, end)) {
    if (before.kind === 'WORK') doneAfter.set(before.key, time);
    else time = Math.max(time, (doneAfter.get(before.after) ?? 0) + minutes(before.minMinutes));
  }
  const begun = at - time;
  const runs = batch.route.steps.slice(0, end).flatMap((before) => {
    if (before.kind === 'WAIT') return [];
    const done = begun + (doneAfter.get(before.key) ?? 0);
    return piecesOf(batch, before.scope).map((piece) => aRun(before.key, piece, done));
  });
  return { ...batch, releasedAt: begun, runs };
}

/** A floor on which commands are given one after another, as on a working day. */
export class WorkingFloor {
  now: Instant = NOW;
  private last = new Map<string, { by: Actor; at: Instant; changes: FloorChangeSet }>();

  constructor(
    public batches: FloorBatch[] = [aBatch()],
    readonly shop: FloorShop = aShop(),
  ) {}

  /** The first batch as it stands. */
  get first(): FloorBatch {
    return this.batches[0] as FloorBatch;
  }

  /** The second batch as it stands. */
  get second(): FloorBatch {
    return this.batches[1] as FloorBatch;
  }

  get view(): FloorView {
    return { shop: this.shop, batches: this.batches, now: this.now };
  }

  /** Lets time go by. */
  wait(milliseconds: number): this {
    this.now += milliseconds;
    return this;
  }

  /** What the rules say, without doing it. */
  refusal(command: FloorCommand, actor: Actor = MAKER, batch = this.first): Refusal | null {
    const verdict = judge(this.view, batch, command, actor);
    return verdict.ok ? null : verdict.refusal;
  }

  code(command: FloorCommand, actor: Actor = MAKER, batch = this.first): RefusalCode | 'OK' {
    return this.refusal(command, actor, batch)?.code ?? 'OK';
  }

  /** Does it, and writes overrides down as whoever stores a command does. */
  give(command: FloorCommand, actor: Actor = MAKER, batch = this.first): FloorChangeSet {
    const verdict = judge(this.view, batch, command, actor);
    if (!verdict.ok) throw new Error(`Refused: ${JSON.stringify(verdict.refusal)}`);
    const { changes } = verdict;
    const overrides = changes.cut.map((cut, i) => ({
      id: `${batch.id}/${batch.overrides.length + i}`,
      step: cut.step,
      piece: cut.piece,
      by: actor.memberId,
      at: this.now,
      reason: 'x',
    }));
    this.put({
      ...applyChanges(batch, changes),
      overrides: [...batch.overrides, ...overrides],
    });
    this.last.set(batch.id, { by: actor, at: this.now, changes });
    return changes;
  }

  /** Takes the last command on a batch back, or says why not. */
  undo(actor: Actor = MAKER, batch = this.first, isLatest = true): RefusalCode | 'OK' {
    const last = this.last.get(batch.id);
    if (!last) throw new Error('There is nothing to take back.');
    const recorded = {
      by: last.by.memberId,
      recordedAt: last.at,
      changes: last.changes,
      isLatest,
    };
    const verdict = judgeUndo(this.view, batch, recorded, actor);
    if (!verdict.ok) return verdict.refusal.code;
    this.put(applyChanges(batch, verdict.changes));
    return 'OK';
  }

  /** The first batch's blank stage done, now. */
  milled(): this {
    this.give(move('FIRST_GLUE_UP'));
    return this;
  }

  /** Its panels glued, and clamped from the end of that on. */
  glued(pieces: readonly number[] = [1, 2]): this {
    this.give(start('glue-1', pieces));
    this.wait(minutes(25));
    this.give(finish('glue-1', pieces));
    return this;
  }

  /** Its panels taken out of the clamps after an hour. */
  unclamped(pieces: readonly number[] = [1, 2]): this {
    this.wait(minutes(60));
    this.give(start('unclamp-1', pieces));
    this.give(finish('unclamp-1', pieces));
    return this;
  }

  private put(after: FloorBatch): void {
    this.batches = this.batches.map((other) => (other.id === after.id ? after : other));
  }
}
