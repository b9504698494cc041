import { buildProblem, type PlanInput } from './build';
import { checkPlan, type Violation } from './check/check';
import { forecasts, type Forecast } from './forecast';
import { planForward } from './forward';
import type { Plan } from './model';
import { reasonSentence, unplannedSentence } from './reason-words';

export type { PlanInput } from './build';

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

export interface PlanResult {
  steps: ShopPlanStep[];
  unplanned: { batchId: string; reason: string }[];
  forecasts: Forecast[];
  missedMaxima: Plan['missedMaxima'];
  /** Rules that the plan breaks. A plan with any is a fault of the planner and is not kept. */
  violations: Violation[];
}

/** Plans a shop and checks the plan. Same input, same result. */
export function planShop(input: PlanInput): PlanResult {
  const problem = buildProblem(input);
  const plan = planForward(problem);
  const activities = new Map(problem.activities.map((activity) => [activity.id, activity]));
  const steps = plan.placements.flatMap((placement): ShopPlanStep[] => {
    const activity = activities.get(placement.activity);
    if (!activity || activity.isEnd) return [];
    return [
      {
        batchId: activity.batchId,
        step: activity.step,
        piece: activity.piece,
        startAt: placement.start,
        endAt: placement.end,
        members: placement.people,
        reason: reasonSentence(placement, input),
      },
    ];
  });
  return {
    steps,
    unplanned: plan.unplanned.map(({ batchId, reason }) => ({
      batchId,
      reason: unplannedSentence(reason),
    })),
    forecasts: forecasts(problem, plan, input.hours),
    missedMaxima: plan.missedMaxima,
    violations: checkPlan(problem, plan),
  };
}
