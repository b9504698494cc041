import { describe, expect, it } from 'vitest';
import { endable } from './endable';

describe('a stream that can be ended', () => {
  it('ends while it waits, and cleans up', async () => {
    let wake: () => void = () => undefined;
    let cleaned = false;
    async function* waits(): AsyncGenerator<number, void, undefined> {
      try {
        yield 1;
        await new Promise<void>((resolve) => (wake = resolve));
      } finally {
        cleaned = true;
      }
    }
    const stream = endable(waits(), () => wake());
    expect(await stream.next()).toEqual({ done: false, value: 1 });
    const waiting = stream.next();
    await stream.return();
    expect(await waiting).toEqual({ done: true, value: undefined });
    expect(cleaned).toBe(true);
  });

  it('never begins when it is ended before', async () => {
    let begun = false;
    async function* begins(): AsyncGenerator<number, void, undefined> {
      begun = true;
      yield 1;
    }
    const stream = endable(begins(), () => undefined);
    await stream.return();
    expect(await stream.next()).toEqual({ done: true, value: undefined });
    expect(begun).toBe(false);
  });
});
