import { buildProblem } from './build';
import { checkPlan, type Violation } from './check/check';
import { forecasts, type Forecast } from './forecast';
import { planForward } from './forward';
import type { MissedMaximum } from './model';
import type { PlanInput } from './plan-input';
import { ReasonWords } from './reason-words';

export type { PlanInput } from './plan-input';

/** A planned step as it is kept; instants in milliseconds. */
export interface ShopPlanStep {
  batchId: string;
  step: string;
  piece: number;
  startAt: number;
  endAt: number;
  members: string[];
  reason: string | null;
}

/** Plain data, as JSON would carry it. */
export interface PlanResult {
  /** Those that have not ended, by start. */
  steps: ShopPlanStep[];
  unplanned: { batchId: string; reason: string }[];
  forecasts: Forecast[];
  missedMaxima: MissedMaximum[];
  /** Rules that the plan breaks. A plan with any is a fault of the planner and is not kept. */
  violations: Violation[];
}

/** Plans a shop and checks the plan: a pure function, for a worker thread. Same input, same result. */
export function planShop(input: PlanInput): PlanResult {
  const problem = buildProblem(input);
  const plan = planForward(problem);
  const words = new ReasonWords(input);
  return {
    steps: plan.placements.map((placement) => ({
      batchId: placement.batchId,
      step: placement.step,
      piece: placement.piece,
      startAt: placement.start,
      endAt: placement.end,
      members: [...placement.people],
      reason: words.reason(placement.batchId, placement.reason),
    })),
    unplanned: plan.unplanned.map(({ batchId, reason }) => ({
      batchId,
      reason: words.unplanned(batchId, reason),
    })),
    forecasts: [...forecasts(problem, plan, input.hours).values()],
    missedMaxima: [...plan.missedMaxima],
    violations: checkPlan(problem, plan),
  };
}
