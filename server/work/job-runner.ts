import { EventEmitter } from 'node:events';
import { run, type Logger, type Runner, type TaskList, type WorkerEvents } from 'graphile-worker';
import type { Services } from '#server/http/services';
import type { WorkerWatch } from './watch-workers';

/** The queue is asked at least this often; usually the database says that there is something. */
const POLL_MS = 1_000;
/** After a runner gave up, the next one begins this much later. */
const PAUSE_MS = 1_000;

/**
 * Runs the queue's jobs, one at a time. A runner that cannot tell the queue what became of a job gives up, since that job
 * would stay its own for hours: its lock goes, the watch releases the job, and another runner begins.
 */
export class JobRunner {
  private runner: Runner | null = null;
  private pause: NodeJS.Timeout | null = null;
  private stopped = false;

  constructor(
    private readonly services: Services,
    private readonly logger: Logger,
    private readonly taskList: TaskList,
    private readonly watch: WorkerWatch,
  ) {}

  async begin(): Promise<void> {
    const { doors } = this.services;
    const events = new EventEmitter() as WorkerEvents;
    const pools: string[] = [];
    events.on('pool:create', ({ workerPool: { id } }) => {
      pools.push(id);
      this.watch.holdLockOf(id);
    });
    const runner = await run({
      pgPool: doors.work,
      concurrency: 1,
      pollInterval: POLL_MS,
      noHandleSignals: true,
      logger: this.logger,
      events,
      taskList: this.taskList,
      // Left to themselves, these two are promises that nobody waits for, and a lost connection would end the process.
      preset: { worker: { completeJobBatchDelay: 0, failJobBatchDelay: 0 } },
    });
    this.runner = runner;
    void runner.promise
      .catch((error: unknown) => this.services.log.warn({ error }, 'the queue was lost'))
      .then(() => {
        this.runner = null;
        for (const id of pools) this.watch.letGoOf(id);
        this.beginLater();
      });
  }

  async stop(): Promise<void> {
    this.stopped = true;
    if (this.pause) clearTimeout(this.pause);
    await this.runner?.stop().catch(() => undefined);
  }

  private beginLater(): void {
    if (this.stopped) return;
    this.pause = setTimeout(() => {
      this.begin().catch((error: unknown) => {
        this.services.log.warn({ error }, 'the queue cannot be worked on yet; trying again');
        this.beginLater();
      });
    }, PAUSE_MS);
  }
}
