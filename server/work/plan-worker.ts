import { parentPort } from 'node:worker_threads';
import { planShop, type PlanInput } from '#shared/plan/plan-shop';

/* The planner's thread: takes a shop, gives a checked plan. */

parentPort?.on('message', ({ id, input }: { id: number; input: PlanInput }) => {
  try {
    parentPort?.postMessage({ id, result: planShop(input) });
  } catch (error) {
    const message = error instanceof Error ? (error.stack ?? error.message) : String(error);
    parentPort?.postMessage({ id, error: message });
  }
});
