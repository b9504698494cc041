import { describe, expect, it } from 'vitest';
import { aBatch, aShop, NOW } from '#test/factories/floor';
import {
  aBatchOf,
  aPerson,
  aRun,
  aStep,
  aWait,
  anInput,
  anOccupation,
  planned,
} from '#test/factories/plan';
import { HOUR_MS } from '#shared/time/instant';
import { checkPlan } from './check/check';
import type { PlanInput } from './plan-input';

/** Plans and checks: every case here must also pass the checker. */
function plan(over: Partial<PlanInput>) {
  const made = planned(anInput(over));
  expect(checkPlan(made.problem, made.plan)).toEqual([]);
  return made;
}

const one = [aPerson('maker')];

describe('what cannot be planned', () => {
  const unplanned = (over: Partial<PlanInput>) => {
    const other = aBatchOf([aStep('fine')], { id: 'batch-2', code: 'CT-002' });
    const { plan: made, at } = plan({
      people: one,
      ...over,
      batches: [...(over.batches ?? []), other],
    });
    // The rest of the shop is planned all the same.
    expect(at('fine', 0, 'batch-2').start).toBe(NOW);
    return made.unplanned.map(({ batchId, reason }) => [batchId, reason.code]);
  };

  it.each<[string, PlanInput['batches'][number]]>([
    ['SKILL', aBatchOf([aStep('a', { skill: 'welding' })])],
    ['SKILL', aBatchOf([aStep('a', { people: 2 })])],
    ['HOURS', aBatchOf([aStep('a', { setupMinutes: 241, pausable: false })])],
    ['STATION', aBatch({ boards: 37, route: { id: 'r', steps: [rack()] } })],
    [
      'CLAMPS',
      aBatchOf([aStep('a', { scope: 'PANEL', takes: [{ resource: 'CLAMPS', until: 'a' }] })], {
        needs: { ...aBatch().needs, panelClamps: { count: 7, length: 700_000_000n } },
      }),
    ],
    ['ROUTE', aBatchOf([aStep('a'), aWait('w', 'nothing', 5), aStep('b')])],
    ['ROUTE', aBatchOf([aWait('w', 'a', 5), aStep('a')])],
    [
      'ROUTE',
      aBatchOf([aStep('b'), aStep('a', { takes: [{ resource: 'oil-rack', until: 'b' }] })]),
    ],
  ])('says %s', (code, batch) => {
    expect(unplanned({ batches: [batch] })).toEqual([['batch-1', code]]);
  });

  it('ends where two batches each hold what the other needs first', () => {
    const shop = aShop({
      stations: ['x', 'y'].map((key) => ({ key, name: key, unit: 'BATCH' as const, capacity: 1 })),
    });
    const batches = [
      ['x', 'y'],
      ['y', 'x'],
    ].map(([mine = '', its = ''], i) =>
      aBatchOf(
        [
          aStep('a', { takes: [{ resource: mine, until: 'c' }] }),
          aStep('b', { station: its }),
          aStep('c'),
        ],
        {
          id: `knot-${i}`,
          code: `CT-01${i}`,
          runs: [aRun('a', { startedAt: NOW - HOUR_MS, finishedAt: NOW })],
          occupations: [anOccupation(mine, 'a')],
        },
      ),
    );
    expect(unplanned({ shop, batches })).toEqual([
      ['knot-0', 'HELD'],
      ['knot-1', 'HELD'],
    ]);
  });

  it('plans nothing for nobody, and for a shop that never opens', () => {
    expect(plan({ people: [] }).plan.unplanned).toHaveLength(1);
    const closed = { zone: 'Europe/Vienna', weekly: [], exceptions: [] };
    expect(plan({ hours: closed }).plan.unplanned).toMatchObject([{ reason: { code: 'HOURS' } }]);
    expect(plan({ batches: [] }).plan).toEqual({
      placements: [],
      unplanned: [],
      missedMaxima: [],
    });
  });
});

function rack() {
  return aStep('a', { takes: [{ resource: 'oil-rack', until: 'a' }] });
}
