import { applyChanges } from '#shared/floor/apply';
import { cardOf, type NextAction } from '#shared/floor/card';
import { judge, type FloorView } from '#shared/floor/judge';
import type {
  Actor,
  FloorBatch,
  FloorChangeSet,
  FloorCommand,
  FloorShop,
} from '#shared/floor/model';
import { piecesOf } from '#shared/floor/pieces';
import { runOf, standardMinutes } from '#shared/floor/progress';
import { MINUTE_MS, type Instant } from '#shared/time/instant';
import type { FloorEventType } from '#server/db/events';

/** Work is looked for at this rhythm. */
const TICK_MINUTES = 10;

export interface SimulatedPerson extends Actor {
  skills: readonly string[];
}

/** A batch that comes into the shop at some time; it may ship when it is ready. */
export interface SimulatedBatch {
  batch: FloorBatch;
  entersAt: Instant | null;
  shipsWhenReady: boolean;
  /** The step that the crew has not come to yet; null for as far as they get. */
  stopBefore: string | null;
}

export interface SimulatedEvent {
  type: FloorEventType;
  by: string;
  at: Instant;
  batchId: string;
  version: number;
  changes: FloorChangeSet;
  /** For moves. */
  to: string | null;
}

export interface SimulatedDays {
  batches: FloorBatch[];
  events: SimulatedEvent[];
}

/**
 * Lets a crew work through past days by the rules of the floor: whoever is free takes the most pressing work they can
 * do, works for the standard time, and goes on. What comes out is a shop in the middle of its day, with a history that
 * the rules allowed.
 */
export function simulateDays(given: {
  shop: FloorShop;
  people: readonly SimulatedPerson[];
  batches: readonly SimulatedBatch[];
  from: Instant;
  now: Instant;
  isWorked(at: Instant): boolean;
}): SimulatedDays {
  const { shop, people, from, now, isWorked } = given;
  let batches = given.batches.map(({ batch }) => batch);
  const events: SimulatedEvent[] = [];
  const stops = new Map(given.batches.map((each) => [each.batch.id, each.stopBefore]));
  const busy = new Map<
    string,
    { batchId: string; step: string; pieces: number[]; until: Instant }
  >();

  const give = (
    batchId: string,
    command: FloorCommand,
    actor: SimulatedPerson,
    at: Instant,
  ): boolean => {
    const batch = batches.find((candidate) => candidate.id === batchId);
    if (!batch) return false;
    const view: FloorView = { shop, batches, now: at };
    const verdict = judge(view, batch, command, actor);
    if (!verdict.ok) return false;
    const after = { ...applyChanges(batch, verdict.changes), version: batch.version + 1 };
    batches = batches.map((other) => (other.id === batchId ? after : other));
    events.push({
      type: typeOf(command),
      by: actor.memberId,
      at,
      batchId,
      version: after.version,
      changes: verdict.changes,
      to: command.kind === 'MOVE' ? command.to : null,
    });
    return true;
  };

  for (let at = from; at <= now; at += TICK_MINUTES * MINUTE_MS) {
    const [first] = people;
    if (!first || !isWorked(at)) continue;
    for (const { batch, entersAt, shipsWhenReady } of given.batches) {
      const current = batches.find((candidate) => candidate.id === batch.id);
      if (!current || entersAt === null || entersAt > at) continue;
      if (current.releasedAt === null) give(batch.id, move('BLANK'), first, at);
      else if (
        shipsWhenReady &&
        current.shippedAt === null &&
        cardOf(current, at).place === 'READY'
      ) {
        give(batch.id, move('SHIPPED'), first, at);
      }
    }
    for (const person of people) {
      const task = busy.get(person.memberId);
      if (task) {
        if (task.until > at) continue;
        give(task.batchId, step('FINISH', task.step, task.pieces), person, at);
        busy.delete(person.memberId);
      }
      const taken = takeWork(batches, stops, person, at, (batch, action, pieces) =>
        give(batch.id, step('START', action.step.key, pieces), person, at),
      );
      if (taken) busy.set(person.memberId, taken);
    }
  }
  return { batches, events };
}

/** The first work that a person can take: what runs out soonest first, then what is due first. */
function takeWork(
  batches: readonly FloorBatch[],
  stops: ReadonlyMap<string, string | null>,
  person: SimulatedPerson,
  at: Instant,
  start: (batch: FloorBatch, action: NextAction, pieces: number[]) => boolean,
): { batchId: string; step: string; pieces: number[]; until: Instant } | null {
  const open = batches
    .filter((batch) => batch.releasedAt !== null && batch.shippedAt === null)
    .sort((a, b) => ((a.shipBy ?? '9') < (b.shipBy ?? '9') ? -1 : 1));
  for (const batch of open) {
    const tried = new Set<string>();
    const order = batch.route.steps.map((each) => each.key);
    const stop = order.indexOf(stops.get(batch.id) ?? '');
    for (const action of cardOf(batch, at).actions) {
      if (action.kind !== 'START' || tried.has(action.step.key)) continue;
      tried.add(action.step.key);
      if (stop >= 0 && order.indexOf(action.step.key) >= stop) continue;
      if (action.step.skill !== null && !person.skills.includes(action.step.skill)) continue;
      const startable = piecesOf(batch, action.step.scope).filter(
        (piece) => runOf(batch, action.step.key, piece)?.startedAt == null,
      );
      // As many pieces at once as bench and clamps allow.
      for (let many = Math.min(6, startable.length); many >= 1; many--) {
        const pieces = startable.slice(0, many);
        if (!start(batch, action, pieces)) continue;
        const minutes = standardMinutes(batch, action.step) * many;
        return {
          batchId: batch.id,
          step: action.step.key,
          pieces,
          until: at + minutes * MINUTE_MS,
        };
      }
    }
  }
  return null;
}

function move(to: 'BLANK' | 'SHIPPED'): FloorCommand {
  return { kind: 'MOVE', to, reason: null, happenedAt: null, override: null };
}

function step(kind: 'START' | 'FINISH', key: string, pieces: readonly number[]): FloorCommand {
  return { kind, step: key, pieces, happenedAt: null, override: null };
}

function typeOf(command: FloorCommand): FloorEventType {
  switch (command.kind) {
    case 'START':
      return 'STEP_STARTED';
    case 'FINISH':
      return 'STEP_FINISHED';
    case 'MOVE':
      return 'BATCH_MOVED';
    case 'ASSIGN':
      return 'BATCH_ASSIGNED';
  }
}
