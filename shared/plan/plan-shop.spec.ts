import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { aBatch, aShop, hours as elapsed, MAKER, NOW } from '#test/factories/floor';
import { applyChanges } from '#shared/floor/apply';
import { cardOf } from '#shared/floor/card';
import { judge } from '#shared/floor/judge';
import type { FloorBatch } from '#shared/floor/model';
import { DEFAULT_SKILLS, DEFAULT_WEEKLY } from '#shared/shop/defaults';
import { DAY_MS, HOUR_MS, MINUTE_MS, parseInstant } from '#shared/time/instant';
import { activityId, buildProblem, endId, type PlanInput } from './build';
import { checkPlan, type Violation } from './check/check';
import { planForward } from './forward';
import type { Placement, Plan, Problem } from './model';
import { planShop } from './plan-shop';

const SEED = 20261202;
const RUNS = process.env['DEEP'] === '1' ? 400 : 25;

function anInput(over: Partial<PlanInput> = {}): PlanInput {
  return {
    now: NOW,
    shop: aShop(),
    hours: { zone: 'Europe/Vienna', weekly: DEFAULT_WEEKLY, exceptions: [] },
    people: [
      { id: 'maker', skills: DEFAULT_SKILLS, weekly: null, exceptions: [] },
      { id: 'helper', skills: ['gluing', 'sanding', 'finishing'], weekly: null, exceptions: [] },
    ],
    batches: [aBatch()],
    ...over,
  };
}

function plan(input: PlanInput): {
  problem: Problem;
  plan: Plan;
  at(step: string, piece?: number): Placement;
} {
  const problem = buildProblem(input);
  const made = planForward(problem);
  expect(checkPlan(problem, made)).toEqual([]);
  return {
    problem,
    plan: made,
    at: (step, piece = 0) => {
      const id = activityId('batch-1', step, piece);
      const found = made.placements.find((each) => each.activity === id);
      if (!found) throw new Error(`${id} is not in the plan`);
      return found;
    },
  };
}

/** Batches brought to random states by the rules themselves. */
function worked(
  batches: readonly FloorBatch[],
  picks: readonly number[],
  now: number,
): FloorBatch[] {
  let state = [...batches];
  let at = now - 4 * DAY_MS;
  for (const pick of picks) {
    at = Math.min(now, at + (pick % 7) * 47 * MINUTE_MS);
    const batch = state[pick % state.length];
    const actions = batch ? cardOf(batch, at).actions : [];
    const action = actions[pick % Math.max(1, actions.length)];
    if (!batch || !action) continue;
    const { kind, step, piece } = action;
    const command = { kind, step: step.key, pieces: [piece], happenedAt: null, override: null };
    const verdict = judge({ shop: aShop(), batches: state, now: at }, batch, command, MAKER);
    if (!verdict.ok) continue;
    const after = applyChanges(batch, verdict.changes);
    state = state.map((other) => (other.id === batch.id ? after : other));
  }
  return state;
}

describe('the forward plan', () => {
  it('lets the glue dry overnight and lays work into working hours', () => {
    const { at } = plan(anInput());
    // 09:00 in Vienna: milling 15 + 4 x 6 min, ripping 10 + 4 x 5 min.
    expect(at('mill')).toMatchObject({ start: NOW, end: NOW + 39 * MINUTE_MS });
    expect(at('rip').end).toBe(NOW + 69 * MINUTE_MS);
    expect(at('unclamp-1', 1).start).toBeGreaterThanOrEqual(at('glue-1', 1).end + HOUR_MS);
    expect(at('flatten-1', 1).start).toBeGreaterThanOrEqual(at('glue-1', 1).end + 12 * HOUR_MS);
    // Flattening waits for the morning: 08:00 on Wednesday.
    expect(at('flatten-1', 1).start).toBe(parseInstant('2026-12-02T07:00:00Z'));
  });

  it('counts clamps from spreading until somebody takes them off next morning', () => {
    const clamps = [{ key: 'c600', length: 600_000_000n, count: 4 }];
    const late = parseInstant('2026-12-01T15:15:00Z');
    const batches = worked([aBatch()], [0, 0, 0, 0], NOW - DAY_MS);
    const started = { ...batches[0], id: 'batch-1' } as FloorBatch;
    const { at } = plan(anInput({ now: late, shop: aShop({ clamps }), batches: [started] }));
    const [first, second] = [at('glue-1', 1), at('glue-1', 2)].sort((a, b) => a.start - b.start);
    const off = at('unclamp-1', first?.activity.endsWith('/1') ? 1 : 2);
    expect(second?.start).toBeGreaterThanOrEqual(off.end);
  });

  it('moves flattening later where faces would not be fresh any more', () => {
    // One clamp's worth of blocks at a time: gluing drags on, so flattening must not come too early.
    const clamps = [{ key: 'c600', length: 600_000_000n, count: 4 }];
    const batch = aBatch({
      boards: 12,
      needs: {
        ...aBatch().needs,
        panelBoards: 12,
        blockClamps: { count: 4, length: 400_000_000n },
      },
    });
    const { plan: made } = plan(anInput({ shop: aShop({ clamps }), batches: [batch] }));
    expect(made.unplanned).toEqual([]);
    for (const missed of made.missedMaxima) expect(missed.lateMinutes).toBeGreaterThan(0);
  });

  it('says what is impossible instead of failing, and plans the rest', () => {
    const other = aBatch({ id: 'batch-2', code: 'CT-002', boards: 60, needs: aBatch().needs });
    const result = planShop(anInput({ batches: [aBatch(), other] }));
    expect(result.violations).toEqual([]);
    expect(result.unplanned).toMatchObject([{ batchId: 'batch-2' }]);
    expect(result.unplanned[0]?.reason).toContain('oil rack');
    expect(result.forecasts.map((each) => each.batchId)).toEqual(['batch-1']);
    const nobody = planShop(anInput({ people: [] }));
    expect(nobody.unplanned[0]?.reason).toMatch(/skill|people/);
    const closed = planShop(
      anInput({
        hours: { zone: 'Europe/Vienna', weekly: [[], [], [], [], [], [], []], exceptions: [] },
      }),
    );
    expect(closed.unplanned).toHaveLength(1);
    expect(planShop(anInput({ batches: [] }))).toMatchObject({ steps: [], violations: [] });
  });

  it('keeps a glue-up out of a span that is too short for it', () => {
    const weekly = Array.from({ length: 7 }, () => [
      { from: 540, to: 560 },
      { from: 600, to: 630 },
    ]);
    const { at } = plan(anInput({ hours: { zone: 'Europe/Vienna', weekly, exceptions: [] } }));
    const { start, end } = at('glue-1', 1);
    expect(end - start).toBe(25 * MINUTE_MS);
  });

  it('waits stay exact over the night in which clocks change', () => {
    const now = parseInstant('2027-03-27T14:00:00Z');
    const weekly = Array.from({ length: 7 }, () => [{ from: 0, to: 1440 }]);
    const { at } = plan(anInput({ now, hours: { zone: 'Europe/Vienna', weekly, exceptions: [] } }));
    expect(at('unclamp-1', 1).start - at('glue-1', 1).end).toBeGreaterThanOrEqual(HOUR_MS);
    expect(at('flatten-1', 1).start - at('glue-1', 1).end).toBeGreaterThanOrEqual(12 * HOUR_MS);
    expect(at('flatten-1', 1).start - at('glue-1', 1).end).toBeLessThan(12 * HOUR_MS + elapsed(2));
  });

  it('gives the slack against the ship-by date in working time', () => {
    const [forecast] = planShop(anInput()).forecasts;
    expect(forecast?.slackMinutes).toBeGreaterThan(0);
    const [late] = planShop(anInput({ batches: [aBatch({ shipBy: '2026-12-01' })] })).forecasts;
    expect(late?.slackMinutes).toBeLessThan(0);
    expect(late?.slackDays).toBeLessThan(0);
    const [free] = planShop(anInput({ batches: [aBatch({ shipBy: null })] })).forecasts;
    expect(free).toMatchObject({ slackMinutes: null, slackDays: null });
  });

  it(`keeps every rule on random shops, the same way each time (seed ${SEED})`, () => {
    const shop = fc.record({
      picks: fc.array(fc.nat({ max: 10_000 }), { maxLength: 160 }),
      boards: fc.array(fc.integer({ min: 1, max: 9 }), { minLength: 1, maxLength: 5 }),
      off: fc.integer({ min: 0, max: 20 * 24 * 60 }),
      people: fc.integer({ min: 1, max: 3 }),
    });
    fc.assert(
      fc.property(shop, ({ picks, boards, off, people }) => {
        const now = NOW + off * MINUTE_MS;
        const batches = boards.map((n, i) =>
          aBatch({ id: `b${i}`, code: `CT-00${i}`, boards: n, shipBy: `2026-12-${10 + i}` }),
        );
        const input = anInput({
          now,
          batches: worked(batches, picks, now),
          people: Array.from({ length: people }, (_, i) => ({
            id: i === 0 ? 'maker' : `p${i}`,
            skills: DEFAULT_SKILLS,
            weekly: null,
            exceptions: [],
          })),
        });
        const result = planShop(input);
        expect(result.violations).toEqual([]);
        expect(result.unplanned).toEqual([]);
        expect(JSON.stringify(planShop(input))).toBe(JSON.stringify(result));
        // A plan that passes still passes with more capacity.
        const roomier = {
          ...input.shop,
          stations: input.shop.stations.map((each) => ({ ...each, capacity: each.capacity + 1 })),
        };
        const problem = buildProblem({ ...input, shop: roomier });
        expect(checkPlan(problem, planForward(buildProblem(input)))).toEqual([]);
      }),
      { numRuns: RUNS, seed: SEED },
    );
  });
});

describe('the checker', () => {
  const good = () => plan(anInput());
  const broken = (
    change: (plan: Plan, at: (step: string, piece?: number) => Placement) => void,
  ) => {
    const { problem, plan: made } = good();
    const copy = structuredClone(made);
    change(copy, (step, piece = 0) => {
      const found = copy.placements.find(
        (each) => each.activity === activityId('batch-1', step, piece),
      );
      if (!found) throw new Error(step);
      return found;
    });
    return checkPlan(problem, copy).map((violation) => violation.rule);
  };
  const shift = (placement: Placement, by: number) => {
    placement.start += by;
    placement.end += by;
  };

  it.each<[Violation['rule'], Parameters<typeof broken>[0]]>([
    ['PLACED_ONCE', (made) => made.placements.pop()],
    ['PLACED_ONCE', (made) => made.placements.push({ ...(made.placements[0] as Placement) })],
    ['NOT_BEFORE_NOW', (_made, at) => shift(at('mill'), -HOUR_MS)],
    ['DURATION', (_made, at) => (at('mill').end += MINUTE_MS)],
    ['DURATION', (_made, at) => shift(at('final-check'), 12 * HOUR_MS)],
    [
      'WHOLE_SPAN',
      (_made, at) => {
        const glue = at('glue-1', 1);
        // Ten minutes before the noon break and fifteen after it.
        glue.start = parseInstant('2026-12-01T10:50:00Z');
        glue.end = parseInstant('2026-12-01T12:15:00Z');
      },
    ],
    ['ORDER', (_made, at) => shift(at('rip'), -20 * MINUTE_MS)],
    ['MINIMUM', (_made, at) => shift(at('unclamp-1', 1), -30 * MINUTE_MS)],
    [
      'MAXIMUM',
      (_made, at) => {
        for (const piece of [1, 2]) shift(at('glue-1', piece), 3 * DAY_MS);
      },
    ],
    ['PEOPLE', (_made, at) => (at('mill').people = [])],
    ['SKILL', (_made, at) => (at('mill').people = ['helper'])],
    [
      'PERSON_TWICE',
      (_made, at) => {
        at('glue-1', 2).start = at('glue-1', 1).start;
        at('glue-1', 2).end = at('glue-1', 1).end;
        at('glue-1', 2).people = at('glue-1', 1).people;
      },
    ],
    ['CLAMPS', (_made, at) => (at('glue-1', 1).clamps = [])],
    ['CLAMPS', (_made, at) => (at('glue-1', 1).clamps = [{ key: 'c600', units: 40 }])],
  ])('refuses a plan that breaks %s', (rule, change) => {
    expect(broken(change)).toContain(rule);
  });

  it('refuses two batches at one station, and occupations that last too long', () => {
    const other = aBatch({ id: 'batch-2', code: 'CT-002' });
    const problem = buildProblem(anInput({ batches: [aBatch(), other] }));
    const made = planForward(problem);
    const mill = (id: string) =>
      made.placements.find((each) => each.activity === activityId(id, 'mill', 0)) as Placement;
    mill('batch-2').start = mill('batch-1').start;
    mill('batch-2').end = mill('batch-1').end;
    expect(checkPlan(problem, made).map((each) => each.rule)).toContain('STATION');
    expect(problem.activities.some((each) => each.id === endId('batch-2'))).toBe(true);
  });
});
