import { applyChanges } from '#shared/floor/apply';
import { cardOf } from '#shared/floor/card';
import { judge } from '#shared/floor/judge';
import type { FloorBatch, FloorShop, Occupation, StepRun } from '#shared/floor/model';
import { buildProblem } from '#shared/plan/build';
import { planForward } from '#shared/plan/forward';
import type { Activity, Placement, Plan, Problem } from '#shared/plan/model';
import type { PlanInput, PlanPerson } from '#shared/plan/plan-input';
import type { Route, WaitStep, WorkStep } from '#shared/route/route';
import { DEFAULT_SKILLS, DEFAULT_WEEKLY } from '#shared/shop/defaults';
import { DAY_MS, MINUTE_MS, type Instant } from '#shared/time/instant';
import { aBatch, aShop, MAKER, NOW } from './floor';

export const EVER_OPEN = Array.from({ length: 7 }, () => [{ from: 0, to: 1440 }]);

export function aPerson(id: string, over: Partial<PlanPerson> = {}): PlanPerson {
  return { id, skills: DEFAULT_SKILLS, weekly: null, exceptions: [], ...over };
}

/** Tuesday, 09:00 in Vienna; open Monday to Friday, 08:00 to 12:00 and 13:00 to 17:00; a maker, and a helper who does not machine. */
export function anInput(over: Partial<PlanInput> = {}): PlanInput {
  return {
    now: NOW,
    shop: aShop(),
    hours: { zone: 'Europe/Vienna', weekly: DEFAULT_WEEKLY, exceptions: [] },
    people: [aPerson('maker'), aPerson('helper', { skills: ['gluing', 'sanding', 'finishing'] })],
    batches: [aBatch()],
    ...over,
  };
}

/** A step that anyone does in 60 minutes on the whole batch, with no station. */
export function aStep(key: string, over: Partial<WorkStep> = {}): WorkStep {
  return {
    kind: 'WORK',
    key,
    stage: 'SAND',
    name: key,
    scope: 'BATCH',
    verb: key,
    setupMinutes: 60,
    pieceMinutes: 0,
    pausable: true,
    people: 1,
    skill: null,
    station: null,
    takes: [],
    caution: null,
    ...over,
  };
}

export function aWait(
  key: string,
  after: string,
  minMinutes: number,
  over: Partial<WaitStep> = {},
): WaitStep {
  return {
    kind: 'WAIT',
    key,
    stage: 'SAND',
    name: key,
    scope: 'BATCH',
    hold: 'SOAK',
    after,
    minMinutes,
    maxMinutes: null,
    source: 'the shop',
    referenceTenthsC: null,
    ...over,
  };
}

/** A batch of one board that goes through the given steps. */
export function aBatchOf(steps: Route['steps'], over: Partial<FloorBatch> = {}): FloorBatch {
  return aBatch({ boards: 1, route: { id: 'route', steps }, ...over });
}

export interface Planned {
  problem: Problem;
  plan: Plan;
  /** The placement of a step on a piece of a batch; throws when there is none. */
  at(step: string, piece?: number, batchId?: string): Placement;
  activity(step: string, piece?: number, batchId?: string): Activity;
}

export function planned(input: PlanInput): Planned {
  const problem = buildProblem(input);
  const plan = planForward(problem);
  const find = <T extends { batchId: string; step: string; piece: number }>(
    all: readonly T[],
    step: string,
    piece: number,
    batchId: string,
  ): T => {
    const found = all.find(
      (each) => each.batchId === batchId && each.step === step && each.piece === piece,
    );
    if (!found) throw new Error(`There is no ${step} of piece ${piece} of ${batchId}.`);
    return found;
  };
  return {
    problem,
    plan,
    at: (step, piece = 0, batchId = 'batch-1') => find(plan.placements, step, piece, batchId),
    activity: (step, piece = 0, batchId = 'batch-1') =>
      find(problem.activities, step, piece, batchId),
  };
}

/** Batches brought to some state by the rules themselves: at each number somebody does something that a card offers. */
export function worked(
  shop: FloorShop,
  batches: readonly FloorBatch[],
  picks: readonly number[],
  now: Instant,
): FloorBatch[] {
  let state = [...batches];
  let at = now - 4 * DAY_MS;
  for (const pick of picks) {
    at = Math.min(now, at + (pick % 7) * 47 * MINUTE_MS + (pick % 1000));
    const batch = state[pick % state.length];
    const actions = batch ? cardOf(batch, at).actions : [];
    const action = actions[pick % Math.max(1, actions.length)];
    if (!batch || !action) continue;
    const { kind, step, piece } = action;
    const command = { kind, step: step.key, pieces: [piece], happenedAt: null, override: null };
    const actor = pick % 3 === 0 ? { ...MAKER, memberId: 'p1' } : MAKER;
    const verdict = judge({ shop, batches: state, now: at }, batch, command, actor);
    if (!verdict.ok) continue;
    const after = applyChanges(batch, verdict.changes);
    state = state.map((other) => (other.id === batch.id ? after : other));
  }
  return state;
}

/** Reads a local clock of Vienna in winter, as in "2026-12-01 09:00". */
export function vienna(clock: string): Instant {
  return Date.parse(`${clock.replace(' ', 'T')}:00+01:00`);
}

/** A step that someone has begun, and perhaps finished. */
export function aRun(step: string, at: { startedAt?: Instant; finishedAt?: Instant }): StepRun {
  return {
    step,
    piece: 0,
    startedAt: at.startedAt ?? null,
    startedBy: 'maker',
    finishedAt: at.finishedAt ?? null,
    finishedBy: at.finishedAt === undefined ? null : 'maker',
    cutAt: null,
    cutBy: null,
  };
}

/** Something that a batch keeps occupied since an hour ago. */
export function anOccupation(resource: string, step: string, piece = 0): Occupation {
  return {
    resource,
    isClamps: false,
    amount: 1,
    step,
    piece,
    since: NOW - 60 * MINUTE_MS,
    until: null,
  };
}

/** The plan with one placement changed. */
export function changed({ plan }: Planned, of: Placement, change: Partial<Placement>): Plan {
  const placements = plan.placements.map((placement) =>
    placement === of ? { ...placement, ...change } : placement,
  );
  return { ...plan, placements };
}

/** A placement in one span, at another time. */
export function moved(
  placement: Pick<Placement, 'start' | 'end'>,
  start: Instant,
  length = placement.end - placement.start,
): Pick<Placement, 'start' | 'end' | 'segments'> {
  const end = start + length;
  return { start, end, segments: [{ start, end }] };
}
