import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { aBatch, aShop, NOW } from '#test/factories/floor';
import { anInput, aPerson, EVER_OPEN, planned, vienna, worked } from '#test/factories/plan';
import { randomInput } from '#test/factories/random-plan';
import { HOUR_MS, MINUTE_MS, parseInstant } from '#shared/time/instant';
import { buildProblem } from './build';
import { checkPlan } from './check/check';
import { planForward } from './forward';
import { planShop } from './plan-shop';

const SEED = 20261202;
const DEEP = process.env['DEEP'] === '1';
const RUNS = DEEP ? 2_000 : 60;

describe('planShop on the default route', () => {
  it('glues, lets it dry overnight, and goes on when the shop opens', () => {
    const { at } = planned(anInput());
    // Milling 15 + 4 x 6 minutes, ripping 10 + 4 x 5.
    expect(at('mill')).toMatchObject({ start: NOW, end: NOW + 39 * MINUTE_MS });
    expect(at('rip').end).toBe(NOW + 69 * MINUTE_MS);
    expect(at('unclamp-1', 1).start).toBe(at('glue-1', 1).end + HOUR_MS);
    expect(at('flatten-1', 1).start).toBe(vienna('2026-12-02 08:00'));
  });

  it('lets an hour in clamps be an hour in the night in which clocks change, either way', () => {
    for (const now of ['2027-03-27T22:10:00Z', '2027-10-30T21:40:00Z']) {
      const hours = { zone: 'Europe/Vienna', weekly: EVER_OPEN, exceptions: [] };
      const people = ['a', 'b', 'c'].map((id) => aPerson(id));
      const { at } = planned(anInput({ now: parseInstant(now), hours, people }));
      expect(at('unclamp-1', 1).start - at('glue-1', 1).end).toBe(HOUR_MS);
      expect(at('flatten-1', 1).start - at('glue-1', 1).end).toBe(12 * HOUR_MS);
    }
  });

  it('says every reason in words, and what cannot be planned', () => {
    const other = aBatch({ id: 'batch-2', code: 'CT-002', boards: 60 });
    const result = planShop(anInput({ batches: [aBatch(), other] }));
    expect(result.violations).toEqual([]);
    expect(result.unplanned).toEqual([
      {
        batchId: 'batch-2',
        reason: 'Oil coat 1 needs 60 places at the oil rack; it has 36.',
      },
    ]);
    expect(result.forecasts.map(({ batchId }) => batchId)).toEqual(['batch-1']);
    const unclamp = result.steps.find(({ step, piece }) => step === 'unclamp-1' && piece === 1);
    expect(unclamp?.reason).toMatch(/^Not before .*: panel 1 is in clamps\.$/);
    expect(result.steps.find(({ step }) => step === 'mill')?.reason).toBeNull();
    expect(result.steps.map(({ startAt }) => startAt)).toEqual(
      result.steps.map(({ startAt }) => startAt).sort((a, b) => a - b),
    );
  });

  it('gives plain data for plain data, as a thread gets and sends it', () => {
    const input = anInput({ batches: worked(aShop(), [aBatch()], [3, 5, 8, 4, 9], NOW) });
    const result = planShop(input);
    expect(planShop(structuredClone(input))).toEqual(result);
    expect(JSON.parse(JSON.stringify(result))).toEqual(result);
  });
});

describe(`plans of random shops with work under way (seed ${SEED}, ${RUNS} runs)`, () => {
  it('keep every rule, with no batch left out without a true reason', { timeout: 600_000 }, () => {
    fc.assert(
      fc.property(fc.integer(), (seed) => {
        const { problem, plan } = planned(randomInput(seed));
        expect(checkPlan(problem, plan)).toEqual([]);
        const placed = new Set(plan.placements.map(({ batchId }) => batchId));
        expect(problem.batches.length).toBeLessThanOrEqual(
          placed.size + plan.unplanned.length + doneBatches(problem).size,
        );
      }),
      { numRuns: RUNS, seed: SEED },
    );
  });

  it('are the same for the same shop, in whatever order its batches and people come', () => {
    fc.assert(
      fc.property(fc.integer(), (seed) => {
        const input = randomInput(seed);
        const once = JSON.stringify(planShop(input));
        expect(JSON.stringify(planShop(input))).toBe(once);
        const turned = {
          ...input,
          batches: [...input.batches].reverse(),
          people: [...input.people].reverse(),
        };
        expect(JSON.stringify(planShop(turned))).toBe(once);
      }),
      { numRuns: RUNS / 4, seed: SEED + 1 },
    );
  });

  it('still keep every rule where there is more of everything', () => {
    fc.assert(
      fc.property(fc.integer(), (seed) => {
        const problem = buildProblem(randomInput(seed));
        const plan = planForward(problem);
        const roomier = {
          ...problem,
          stations: problem.stations.map((each) => ({ ...each, capacity: each.capacity + 1 })),
          clamps: problem.clamps.map((each) => ({ ...each, count: each.count + 1 })),
        };
        // That a batch was left out for too little room is no longer true, and need not be.
        const broken = checkPlan(roomier, plan).filter(({ rule }) => rule !== 'UNPLANNED');
        expect(broken).toEqual([]);
      }),
      { numRuns: RUNS / 4, seed: SEED + 2 },
    );
  });
});

function doneBatches({ activities }: ReturnType<typeof buildProblem>): Set<string> {
  return new Set(
    activities.filter(({ state }) => state.kind === 'DONE').map(({ batchId }) => batchId),
  );
}
