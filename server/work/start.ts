import { Logger as JobLogger, runMigrations } from 'graphile-worker';
import type { Services } from '#server/http/services';
import { planTask } from '#server/plan/plan-task';
import { JobRunner } from './job-runner';
import { Planner } from './planner';
import { Relay } from './relay';
import { WorkerWatch } from './watch-workers';

export interface RunningWork {
  stop(): Promise<void>;
}

/** Starts the background work of this process: the queue's runner, the relay, the planner's thread. */
export async function startWork(services: Services): Promise<RunningWork> {
  const { doors, log } = services;
  const logger = new JobLogger(() => (level, message, meta) => {
    if (level === 'error' || level === 'warning') log.warn({ meta }, message);
  });
  await runMigrations({ pgPool: doors.work, logger });
  const planner = new Planner();
  const watch = new WorkerWatch(services);
  const runner = new JobRunner(services, logger, { plan: planTask(services, planner) }, watch);
  await runner.begin();
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
