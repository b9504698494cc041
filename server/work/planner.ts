import { existsSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { Worker } from 'node:worker_threads';
import type { PlanInput, PlanResult } from '#shared/plan/plan-shop';

/** A plan that takes longer than this is given up; the last good one stays. */
const TIMEOUT_MS = 60_000;

interface Waiting {
  resolve(result: PlanResult): void;
  reject(error: Error): void;
  timer: NodeJS.Timeout;
}

/** Plans in a thread of its own, so that no request waits for it. A thread that dies is replaced at the next plan. */
export class Planner {
  private worker: Worker | null = null;
  private readonly waiting = new Map<number, Waiting>();
  private count = 0;

  plan(input: PlanInput): Promise<PlanResult> {
    const worker = this.ready();
    const id = this.count++;
    return new Promise((resolve, reject) => {
      const timer = setTimeout(() => {
        this.waiting.delete(id);
        reject(new Error('The planner did not answer in time.'));
        void worker.terminate();
      }, TIMEOUT_MS);
      this.waiting.set(id, { resolve, reject, timer });
      worker.postMessage({ id, input });
    });
  }

  async stop(): Promise<void> {
    await this.worker?.terminate();
  }

  private ready(): Worker {
    if (this.worker) return this.worker;
    const worker = startThread();
    worker.on(
      'message',
      ({ id, result, error }: { id: number; result?: PlanResult; error?: string }) => {
        const asked = this.waiting.get(id);
        if (!asked) return;
        this.waiting.delete(id);
        clearTimeout(asked.timer);
        if (result) asked.resolve(result);
        else asked.reject(new Error(error ?? 'The planner failed.'));
      },
    );
    const gone = (error: Error) => {
      if (this.worker === worker) this.worker = null;
      for (const [id, asked] of this.waiting) {
        clearTimeout(asked.timer);
        this.waiting.delete(id);
        asked.reject(error);
      }
    };
    worker.on('error', gone);
    worker.on('exit', () => gone(new Error('The planner ended.')));
    worker.unref();
    this.worker = worker;
    return worker;
  }
}

/** The thread's program: bundled beside the server, or the source through tsx in development and tests. */
function startThread(): Worker {
  const here = path.dirname(fileURLToPath(import.meta.url));
  const bundled = path.join(here, 'plan-worker.mjs');
  if (existsSync(bundled)) return new Worker(bundled);
  return new Worker(path.join(here, 'plan-worker.ts'), { execArgv: ['--import', 'tsx'] });
}
