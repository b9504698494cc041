import { Logger as JobLogger, run, runMigrations } from 'graphile-worker';
import type { Services } from '#server/http/services';
import { planTask } from '#server/plan/plan-task';
import { Planner } from './planner';
import { Relay } from './relay';
import { watchWorkers } from './watch-workers';

export interface RunningWork {
  stop(): Promise<void>;
}

/** Starts the background work of this process: the queue's worker, the relay, the planner's thread. */
export async function startWork(services: Services): Promise<RunningWork> {
  const { doors, log } = services;
  const logger = new JobLogger(() => (level, message, meta) => {
    if (level === 'error' || level === 'warning') log.warn({ meta }, message);
  });
  await runMigrations({ pgPool: doors.work, logger });
  const planner = new Planner();
  const runner = await run({
    pgPool: doors.work,
    concurrency: 1,
    pollInterval: 1_000,
    noHandleSignals: true,
    logger,
    taskList: { plan: planTask(services, planner) },
  });
  const watch = watchWorkers(services, runner);
  const relay = new Relay(services);
  return {
    stop: async () => {
      await relay.stop();
      await runner.stop();
      watch.stop();
      await planner.stop();
    },
  };
}
