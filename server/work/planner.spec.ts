import { afterAll, expect, it } from 'vitest';
import type { PlanInput } from '#shared/plan/plan-shop';
import { aBatch, aShop, NOW } from '#test/factories/floor';
import { Planner } from './planner';

const planner = new Planner();
afterAll(() => planner.stop());

const weekly = Array.from({ length: 7 }, () => [{ from: 0, to: 1440 }]);
const input: PlanInput = {
  now: NOW,
  shop: aShop(),
  hours: { zone: 'Europe/Vienna', weekly, exceptions: [] },
  people: [
    {
      id: 'maker',
      skills: ['machining', 'gluing', 'sanding', 'finishing'],
      weekly: null,
      exceptions: [],
    },
  ],
  batches: [aBatch()],
};

it('plans on after its thread died, and after a shop that cannot be planned', async () => {
  const { forecasts } = await planner.plan(input);
  expect(forecasts).toHaveLength(1);
  // The thread ends while somebody waits for it, and somebody else asks at once.
  const lost = planner.plan(input);
  const ending = planner.stop();
  await expect(lost).rejects.toThrow('The planner ended.');
  const next = planner.plan(input);
  await ending;
  expect((await next).forecasts).toEqual(forecasts);
  const broken = { ...input, hours: { ...input.hours, zone: 'Nowhere/Here' } };
  await expect(planner.plan(broken)).rejects.toThrow(/Nowhere/);
  expect((await planner.plan(input)).forecasts).toEqual(forecasts);
});
