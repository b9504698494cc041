import { describe, expect, it } from 'vitest';
import { FeedQueue } from './feed-queue';
import type { ShopMessage } from './project';

function message(seq: number, reset = false): ShopMessage {
  return { shopId: 's', seq, now: new Date(0), reset, shopChanged: false, batches: [], by: null };
}

/** Takes so many messages, which must be there. */
async function take(stream: AsyncGenerator<ShopMessage, void>, count: number) {
  const taken: ShopMessage[] = [];
  while (taken.length < count) {
    const { value } = await stream.next();
    if (!value) break;
    taken.push(value);
  }
  return taken.map(({ seq, reset }) => (reset ? `reset ${seq}` : seq));
}

describe('what waits for a subscriber', () => {
  it('comes once and in order, also to one who waits for it', async () => {
    const queue = new FeedQueue();
    const stream = queue.drain(() => message(0, true));
    const taken = take(stream, 3);
    for (const seq of [1, 2, 3]) queue.push(message(seq));
    expect(await taken).toEqual([1, 2, 3]);
  });

  it('leaves out what was read by other means', async () => {
    const queue = new FeedQueue();
    queue.since = 2;
    for (const seq of [1, 2, 3, 4]) queue.push(message(seq));
    expect(
      await take(
        queue.drain(() => message(0, true)),
        2,
      ),
    ).toEqual([3, 4]);
  });

  it('is bounded: beyond a hundred a slow one reads everything anew, and goes on from there', async () => {
    const queue = new FeedQueue();
    const stream = queue.drain(() => message(500, true));
    for (let seq = 1; seq <= 500; seq++) queue.push(message(seq));
    expect(await take(stream, 1)).toEqual(['reset 500']);
    queue.push(message(501));
    expect(await take(stream, 1)).toEqual([501]);
  });

  it('holds a hundred without a reset', async () => {
    const queue = new FeedQueue();
    for (let seq = 1; seq <= 100; seq++) queue.push(message(seq));
    const all = await take(
      queue.drain(() => message(0, true)),
      100,
    );
    expect(all).toEqual(Array.from({ length: 100 }, (_, i) => i + 1));
  });

  it('ends for one who waits', async () => {
    const queue = new FeedQueue();
    const next = queue.drain(() => message(0, true)).next();
    queue.end();
    expect(await next).toEqual({ done: true, value: undefined });
  });
});
