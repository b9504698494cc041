import type { ShopMessage } from './project';

/** Messages that a slow subscriber may have waiting; beyond it reads everything anew. */
const BOUND = 100;

/** What waits for one subscriber, in order and bounded. */
export class FeedQueue {
  /** Messages up to here were read by other means; null until that is known. */
  since: number | null = null;
  private waiting: ShopMessage[] = [];
  private overflowed = false;
  private ended = false;
  private wakeUp: (() => void) | null = null;

  push(message: ShopMessage): void {
    if (this.waiting.length >= BOUND) {
      this.overflowed = true;
      this.waiting = [];
    }
    this.waiting.push(message);
    this.wakeUp?.();
  }

  end(): void {
    this.ended = true;
    this.wakeUp?.();
  }

  async *drain(reset: () => ShopMessage): AsyncGenerator<ShopMessage, void, undefined> {
    while (!this.ended) {
      if (this.overflowed) {
        this.overflowed = false;
        this.waiting = [];
        yield reset();
        continue;
      }
      const message = this.waiting.shift();
      if (message) {
        if (this.since === null || message.seq > this.since) yield message;
        continue;
      }
      await new Promise<void>((resolve) => {
        this.wakeUp = resolve;
      });
      this.wakeUp = null;
    }
  }
}
