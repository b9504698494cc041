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

/** A thread and who waits for its answers: one that ends takes no one along who asked its successor. */
interface Thread {
  thread: Worker;
  waiting: Map<number, Waiting>;
}

/** Plans in a thread of its own, so that no request waits for it. A thread that dies is replaced at the next plan. */
export class Planner {
  private worker: Thread | null = null;
  private count = 0;

  plan(input: PlanInput): Promise<PlanResult> {
    const { thread, waiting } = this.ready();
    const id = this.count++;
    return new Promise((resolve, reject) => {
      const timer = setTimeout(() => {
        waiting.delete(id);
        reject(new Error('The planner did not answer in time.'));
        void thread.terminate();
      }, TIMEOUT_MS);
      waiting.set(id, { resolve, reject, timer });
      thread.postMessage({ id, input });
    });
  }

  async stop(): Promise<void> {
    await this.worker?.thread.terminate();
  }

  private ready(): Thread {
    if (this.worker) return this.worker;
    const thread = startThread();
    const waiting = new Map<number, Waiting>();
    const worker = { thread, waiting };
    thread.on(
      'message',
      ({ id, result, error }: { id: number; result?: PlanResult; error?: string }) => {
        const asked = waiting.get(id);
        if (!asked) return;
        waiting.delete(id);
        clearTimeout(asked.timer);
        if (result) asked.resolve(result);
        else asked.reject(new Error(error ?? 'The planner failed.'));
      },
    );
    const gone = (error: Error) => {
      if (this.worker === worker) this.worker = null;
      for (const asked of waiting.values()) {
        clearTimeout(asked.timer);
        asked.reject(error);
      }
      waiting.clear();
    };
    thread.on('error', gone);
    thread.on('exit', () => gone(new Error('The planner ended.')));
    thread.unref();
    this.worker = worker;
    return worker;
  }
}

/** The thread's program: bundled beside the server, or from source in development and tests. */
function startThread(): Worker {
  const here = path.dirname(fileURLToPath(import.meta.url));
  const bundled = path.join(here, 'plan-worker.mjs');
  if (existsSync(bundled)) return new Worker(bundled);
  // Flags of the main thread, such as a test runner's, are none of its business.
  return new Worker(path.join(here, 'plan-worker-source.mjs'), { execArgv: [] });
}
